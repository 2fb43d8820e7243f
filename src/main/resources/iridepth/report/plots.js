// The two charts of the page: the profile along a line with its band, and the histogram.

const BAND = 2; // coverage factor of the band

/** Ends of an axis that shows some values with a little room. */
function roomAround(values, least) {
  let from = Infinity;
  let to = -Infinity;
  for (const v of values) {
    from = Math.min(from, v);
    to = Math.max(to, v);
  }
  const room = Math.max(0.06 * (to - from), least);
  return [from - room, to + room];
}

/** Runs of samples that have a thickness. */
function runs(samples) {
  const list = [];
  let run = [];
  for (const s of samples) {
    if (Number.isNaN(s.thickness)) {
      run = [];
    } else {
      if (run.length === 0) {
        list.push(run);
      }
      run.push(s);
    }
  }
  return list;
}

/** Draws a profile; returns the plot, or null if the line meets no thickness. */
function drawProfile(svg, map, samples) {
  const unit = lengthUnit(map);
  const read = samples.filter(s => !Number.isNaN(s.thickness));
  svg.replaceChildren();
  if (read.length === 0) {
    svg.removeAttribute('viewBox');
    return null;
  }
  const spread = s => Number.isNaN(s.uncertainty) ? 0 : BAND * s.uncertainty;
  const end = Math.max(samples[samples.length - 1].distance, 1) * unit.perPixel;
  const plot = chart(svg, 300, {
    x: [0, end],
    y: roomAround(read.flatMap(s => [s.thickness - spread(s), s.thickness + spread(s)]), 0.05),
    xLabel: `Distance (${unit.name})`,
    yLabel: 'Thickness (nm)',
  });
  const place = (s, offset) => `${plot.x(s.distance * unit.perPixel).toFixed(1)} ${plot.y(s.thickness + offset).toFixed(1)}`;
  for (const run of runs(samples)) {
    const upper = run.map(s => place(s, spread(s)));
    const lower = run.map(s => place(s, -spread(s))).reverse();
    svgElement(svg, 'path', { class: 'band', d: 'M' + upper.concat(lower).join('L') + 'Z' });
    svgElement(svg, 'path', { class: run.length > 1 ? 'curve' : 'curve dot', d: 'M' + run.map(s => place(s, 0)).join('L') + (run.length > 1 ? '' : 'h.01') });
  }
  drawLimits(plot, map.tolerance || [], false);
  plot.sampleAt = x => {
    const distance = plot.x0 + (x - plot.box.left) / (plot.box.right - plot.box.left) * (plot.x1 - plot.x0);
    const index = Math.round(distance / unit.perPixel / map.factor);
    return samples[Math.min(samples.length - 1, Math.max(0, index))];
  };
  return plot;
}

/** The samples as comma-separated values. */
function profileCsv(map, samples) {
  const scaled = map.pixelUm !== null;
  const number = (v, decimals) => Number.isNaN(v) ? '' : v.toFixed(decimals);
  const head = ['distance_px', ...(scaled ? ['distance_um'] : []), 'x_px', 'y_px', 'thickness_nm', 'uncertainty_nm'];
  const lines = samples.map(s => [
    number(s.distance, 3), ...(scaled ? [number(s.distance * map.pixelUm, 4)] : []), number(photoX(map, s.column), 3),
    number(photoY(map, s.row), 3), number(s.thickness, 4), number(s.uncertainty, 4),
  ].join(','));
  return [head.join(','), ...lines].join('\n');
}

/** Thicknesses to show: those of all but a thousandth at either end, with half as much on either side, and near limits. */
function histogramSpan(map) {
  const { first, width, counts } = map.histogram;
  const total = counts.reduce((sum, c) => sum + c, 0);
  const edge = i => first + i * width;
  let low = 0;
  let high = counts.length - 1;
  for (let sum = counts[0]; sum <= 0.001 * total; sum += counts[low]) {
    low++;
  }
  for (let sum = counts[high]; sum <= 0.001 * total; sum += counts[high]) {
    high--;
  }
  const reach = edge(high + 1) - edge(low);
  let from = Math.max(edge(0), edge(low) - reach / 2);
  let to = Math.min(edge(counts.length), edge(high + 1) + reach / 2);
  for (const limit of (map.tolerance || []).filter(v => v !== null && v > from - 3 * reach && v < to + 3 * reach)) {
    from = Math.min(from, limit);
    to = Math.max(to, limit);
  }
  const room = 0.03 * (to - from);
  return [from - room, to + room];
}

/** Draws the histogram; bars of which the middle lies beyond a limit have another colour and pattern. */
function drawHistogram(svg, map) {
  const { first, width, counts } = map.histogram;
  if (counts.length === 0) {
    return;
  }
  const most = Math.max(...counts);
  const span = histogramSpan(map);
  const plot = chart(svg, 320, { x: span, y: [0, 1.05 * most], xLabel: 'Thickness (nm)', yLabel: 'Pixels' });
  const pattern = svgElement(svgElement(svg, 'defs'), 'pattern', {
    id: 'beyond', width: 6, height: 6, patternUnits: 'userSpaceOnUse', patternTransform: 'rotate(45)',
  });
  svgElement(pattern, 'rect', { class: 'beyond-ground', width: 6, height: 6 });
  svgElement(pattern, 'rect', { class: 'beyond-stripe', width: 2, height: 6 });
  const [lower, upper] = map.tolerance || [null, null];
  counts.forEach((count, i) => {
    const from = first + i * width;
    if (count === 0 || from + width < span[0] || from > span[1]) {
      return;
    }
    const middle = from + width / 2;
    const beyond = lower !== null && middle < lower || upper !== null && middle > upper;
    const left = Math.max(plot.x(from), plot.box.left);
    const right = Math.min(plot.x(from + width), plot.box.right);
    const gap = right - left > 3 ? 1 : 0;
    svgElement(svg, 'rect', {
      class: beyond ? 'bar beyond' : 'bar', x: left, y: plot.y(count), width: Math.max(0.5, right - left - gap),
      height: plot.box.bottom - plot.y(count),
    });
  });
  drawLimits(plot, map.tolerance || [], true);
}

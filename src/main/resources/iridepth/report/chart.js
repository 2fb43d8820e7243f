// A chart in SVG: axes with round numbers, and what is drawn in them. Colours come from the style sheet.

function svgElement(parent, name, attributes = {}, text) {
  const element = document.createElementNS('http://www.w3.org/2000/svg', name);
  for (const [key, value] of Object.entries(attributes)) {
    element.setAttribute(key, value);
  }
  if (text !== undefined) {
    element.textContent = text;
  }
  parent.appendChild(element);
  return element;
}

/** The least of 1, 2, 5 times a power of ten that is not below a length. */
function roundStep(least) {
  const power = 10 ** Math.floor(Math.log10(least));
  return [1, 2, 5, 10].map(f => f * power).find(step => step >= least * (1 - 1e-9));
}

/** Round numbers between two ends, with their labels. */
function ticks(from, to, most) {
  const step = roundStep((to - from) / Math.max(1, most));
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  const list = [];
  for (let k = Math.ceil(from / step - 1e-9); k * step <= to + 1e-9 * step; k++) {
    const label = (k * step).toFixed(decimals).replace(/^-(0\.?0*)$/, '$1').replace('-', '\u2212');
    list.push({ value: k * step, label: grouped(label) });
  }
  return list;
}

/** An empty chart in place of what an SVG element held; x and y turn values into places. */
function chart(svg, height, { x: [x0, x1], y: [y0, y1], xLabel, yLabel }) {
  const width = Math.max(260, svg.parentElement.clientWidth);
  svg.replaceChildren();
  svg.setAttribute('viewBox', `0 0 ${width} ${height}`);
  const yTicks = ticks(y0, y1, (height - 60) / 40);
  const box = { left: 36 + 8 * Math.max(...yTicks.map(t => t.label.length)), right: width - 14, top: 12, bottom: height - 48 };
  const x = v => box.left + (v - x0) / (x1 - x0) * (box.right - box.left);
  const y = v => box.bottom - (v - y0) / (y1 - y0) * (box.bottom - box.top);
  for (const tick of yTicks) {
    svgElement(svg, 'path', { class: 'grid', d: `M${box.left} ${y(tick.value)}H${box.right}` });
    svgElement(svg, 'text', { class: 'tick', x: box.left - 8, y: y(tick.value) + 4, 'text-anchor': 'end' }, tick.label);
  }
  for (const tick of ticks(x0, x1, (box.right - box.left) / 80)) {
    svgElement(svg, 'path', { class: 'axis', d: `M${x(tick.value)} ${box.bottom}v5` });
    svgElement(svg, 'text', { class: 'tick', x: x(tick.value), y: box.bottom + 20, 'text-anchor': 'middle' }, tick.label);
  }
  svgElement(svg, 'path', { class: 'axis', d: `M${box.left} ${box.bottom}H${box.right}` });
  svgElement(svg, 'text', { class: 'label', x: (box.left + box.right) / 2, y: height - 6, 'text-anchor': 'middle' }, xLabel);
  svgElement(svg, 'text', {
    class: 'label', 'text-anchor': 'middle', transform: `translate(14 ${(box.top + box.bottom) / 2}) rotate(-90)`,
  }, yLabel);
  return { svg, x, y, box, x0, x1, y0, y1 };
}

/** Upright or level dashed lines at those limits that lie within the chart. */
function drawLimits(plot, limits, upright) {
  const [from, to] = upright ? [plot.x0, plot.x1] : [plot.y0, plot.y1];
  for (const limit of limits.filter(v => v !== null && v >= from && v <= to)) {
    const d = upright ? `M${plot.x(limit)} ${plot.box.top}V${plot.box.bottom}` : `M${plot.box.left} ${plot.y(limit)}H${plot.box.right}`;
    svgElement(plot.svg, 'path', { class: 'limit', d });
  }
}

function cssColour(rgb) {
  return '#' + rgb.toString(16).padStart(6, '0');
}

/** The scale's colours as a gradient for the style sheet. */
function scaleGradient(colours) {
  const stops = Array.from({ length: 17 }, (_, i) => cssColour(colours[Math.round(i / 16 * (colours.length - 1))]));
  return `linear-gradient(90deg, ${stops.join(', ')})`;
}

/** A bar that shows how long a round length is on a map as wide as the element. */
function scaleBar(svg, map) {
  const unit = lengthUnit(map);
  const width = Math.max(200, svg.parentElement.clientWidth);
  const field = map.columns * map.factor * unit.perPixel;
  const length = roundStep(field / 8);
  const decimals = Math.max(0, -Math.floor(Math.log10(length) + 1e-9));
  svg.replaceChildren();
  svg.setAttribute('viewBox', `0 0 ${width} 22`);
  const left = width - length / field * width;
  svgElement(svg, 'path', { class: 'scale-bar', d: `M${left} 12H${width}` });
  svgElement(svg, 'text', { class: 'label', x: left - 10, y: 16, 'text-anchor': 'end' }, `${length.toFixed(decimals)} ${unit.name}`);
}

/** A bar of the scale's colours with its ticks; its points stand for values beyond. */
function colourBar(svg, colours, [from, to], label) {
  const width = Math.max(200, svg.parentElement.clientWidth);
  svg.replaceChildren();
  svg.setAttribute('viewBox', `0 0 ${width} 58`);
  const left = 22;
  const right = width - 22;
  const gradient = svgElement(svgElement(svg, 'defs'), 'linearGradient', { id: 'scale' });
  for (let i = 0; i <= 32; i++) {
    svgElement(gradient, 'stop', { offset: i / 32, 'stop-color': cssColour(colours[Math.round(i / 32 * (colours.length - 1))]) });
  }
  svgElement(svg, 'rect', { x: left, y: 2, width: right - left, height: 14, fill: 'url(#scale)' });
  svgElement(svg, 'path', { d: `M${left} 2l-9 7l9 7z`, fill: cssColour(colours[0]) });
  svgElement(svg, 'path', { d: `M${right} 2l9 7l-9 7z`, fill: cssColour(colours[colours.length - 1]) });
  svgElement(svg, 'path', { class: 'outline', d: `M${left} 2H${right}l9 7l-9 7H${left}l-9 -7z` });
  for (const tick of ticks(from, to, (right - left) / 70)) {
    const x = left + (tick.value - from) / (to - from) * (right - left);
    svgElement(svg, 'path', { class: 'axis', d: `M${x} 16v5` });
    svgElement(svg, 'text', { class: 'tick', x, y: 35, 'text-anchor': 'middle' }, tick.label);
  }
  svgElement(svg, 'text', { class: 'label', x: width / 2, y: 54, 'text-anchor': 'middle' }, label);
}

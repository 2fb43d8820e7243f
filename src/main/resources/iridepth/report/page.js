// Puts the page together.

const byId = id => document.getElementById(id);
const map = readMap();
const photo = byId('photo');
const unit = lengthUnit(map);
const systemDark = matchMedia('(prefers-color-scheme: dark)');
let view;
let profile = { samples: [], plot: null };
let waiting;

/** Speaks to screen readers, once the reader has come to rest. */
function say(text) {
  clearTimeout(waiting);
  waiting = setTimeout(() => { byId('live').textContent = text; }, 150);
}

function place(point) {
  const x = photoX(map, point.column);
  const y = photoY(map, point.row);
  const scaled = v => (v * unit.perPixel).toFixed(unit.decimals);
  return `x ${x}, y ${y} px` + (map.pixelUm === null ? '' : `\n${scaled(x)}, ${scaled(y)} ${unit.name}`);
}

function readPoint(point, spoken) {
  const i = point.row * map.columns + point.column;
  const others = map.others.map(plane => plane[i]).filter(v => !Number.isNaN(v)).map(v => nm(v, 1));
  const texts = {
    position: place(point),
    thickness: nm(map.thickness[i]),
    uncertainty: uncertaintyText(map.uncertainty[i]),
    state: map.states[map.state[i]].label,
    others: others.length ? others.join(', ') : 'none',
  };
  for (const [name, text] of Object.entries(texts)) {
    byId('at-' + name).textContent = text;
  }
  if (spoken) {
    say(`${texts.position.replace('\n', '; ')}. ${texts.thickness}, standard uncertainty ${texts.uncertainty}, ${texts.state}, other candidates: `
      + texts.others + '.');
  }
}

function showLine({ from, to }, done) {
  profile.samples = profileAlong(map, from, to);
  profile.plot = drawProfile(byId('profile-chart'), map, profile.samples);
  const s = statistics(profile.samples.map(p => p.thickness));
  const last = profile.samples[profile.samples.length - 1].distance;
  const length = `${(last * unit.perPixel).toFixed(unit.name === 'px' ? 1 : unit.decimals)} ${unit.name}`;
  const text = s.count === 0 ? `${length}: no thickness is read along this line.`
    : `${length}, ${s.count} of ${s.all} samples read: mean ${nm(s.mean)}, from ${nm(s.least)} to ${nm(s.greatest)}.`;
  byId('profile-text').textContent = text;
  byId('profile-at').textContent = '';
  if (done) {
    byId('profile-values').value = profileCsv(map, profile.samples);
    say('Profile: ' + text);
  }
}

function showRectangle({ from, to }, done) {
  const s = statistics(within(map, from, to));
  const points = map.factor === 1 ? 'pixels' : 'points';
  const texts = {
    count: `${grouped(String(s.count))} of ${grouped(String(s.all))} ${points}`, mean: nm(s.mean), deviation: nm(s.deviation), least: nm(s.least),
    median: nm(s.median), greatest: nm(s.greatest),
  };
  for (const [name, text] of Object.entries(texts)) {
    byId('in-' + name).textContent = text;
  }
  byId('rectangle-empty').hidden = true;
  byId('rectangle-table').hidden = false;
  if (done) {
    say(`Rectangle: ${texts.count} read, mean ${texts.mean}, standard deviation ${texts.deviation}, from ${texts.least} to `
      + `${texts.greatest}, median ${texts.median}.`);
  }
}

const ENDS = ['from-x', 'from-y', 'to-x', 'to-y'];

/** Writes the ends of the shape in hand into the fields. */
function fillEnds() {
  const shape = view.shapes[view.tool];
  const values = shape ? [photoX(map, shape.from.column), photoY(map, shape.from.row), photoX(map, shape.to.column),
    photoY(map, shape.to.row)] : ['', '', '', ''];
  ENDS.forEach((id, k) => { byId(id).value = values[k]; });
}

function drawFromFields() {
  const [x0, y0, x1, y1] = ENDS.map(id => byId(id).valueAsNumber);
  if (![x0, y0, x1, y1].some(Number.isNaN)) {
    view.set(view.tool, pointAt(map, x0, y0), pointAt(map, x1, y1), true);
  }
}

function showLayer(layer) {
  const style = LAYERS[layer];
  byId('map').dataset.layer = layer;
  byId('layer-' + layer).checked = true;
  view.show(layer);
  byId('bar').style.visibility = style.range ? 'visible' : 'hidden';
  if (style.range) {
    colourBar(byId('bar'), map.colours, style.range(map), style.label);
  }
}

function showRegion(index) {
  const [x, y, width, height] = map.doubts[index];
  const a = pointAt(map, x, y);
  const b = pointAt(map, x + width - 1, y + height - 1);
  view.region = [a.column, a.row, b.column + 1, b.row + 1];
  view.readAt({ column: a.column + b.column >> 1, row: a.row + b.row >> 1 }, true);
  byId('stage').scrollIntoView({ block: 'center' });
  byId('stage').focus({ preventScroll: true });
}

function chooseTool(tool) {
  byId('tool-' + tool).checked = true;
  view.tool = tool;
  view.cancel();
  fillEnds();
}

/** A pointer on the profile shows where on the map it is. */
function followProfile(event) {
  if (!profile.plot) {
    return;
  }
  const svg = byId('profile-chart');
  const box = svg.getBoundingClientRect();
  const sample = profile.plot.sampleAt((event.clientX - box.left) / box.width * svg.viewBox.baseVal.width);
  const at = `${(sample.distance * unit.perPixel).toFixed(unit.decimals)} ${unit.name}: ${nm(sample.thickness)}`;
  byId('profile-at').textContent = Number.isNaN(sample.thickness) ? at
    : `${at}, standard uncertainty ${uncertaintyText(sample.uncertainty)}`;
  view.readAt({ column: Math.round(sample.column), row: Math.round(sample.row) });
}

function isDark() {
  return (document.documentElement.dataset.theme || (systemDark.matches ? 'dark' : 'light')) === 'dark';
}

function showTheme() {
  byId('theme').setAttribute('aria-pressed', String(isDark()));
}

function toggleTheme() {
  document.documentElement.dataset.theme = isDark() ? 'light' : 'dark';
  showTheme();
}

function start() {
  view = new MapView(byId('stage'), map, photo, {
    read: readPoint,
    say,
    tool: chooseTool,
    layer: layer => byId('layer-' + layer) && showLayer(layer),
    drawn: (tool, shape, done) => {
      (tool === 'line' ? showLine : showRectangle)(shape, done);
      fillEnds();
    },
  });
  document.documentElement.style.setProperty('--scale', scaleGradient(map.colours));
  byId('frame').style.setProperty('--shape', map.columns / map.rows);
  for (const layer of Object.keys(LAYERS)) {
    const radio = byId('layer-' + layer);
    if (layer === 'photo' && !photo) {
      radio.closest('label').remove();
      continue;
    }
    paintThumbnail(byId('small-' + layer), map, photo, layer, 320);
    radio.addEventListener('change', () => showLayer(layer));
  }
  for (const tool of ['line', 'rectangle']) {
    byId('tool-' + tool).addEventListener('change', () => chooseTool(tool));
  }
  ENDS.forEach((id, k) => {
    byId(id).max = (k % 2 ? map.height : map.width) - 1;
    byId(id).addEventListener('change', drawFromFields);
  });
  document.querySelectorAll('[data-doubt]').forEach(button =>
    button.addEventListener('click', () => showRegion(Number(button.dataset.doubt))));
  byId('theme').addEventListener('click', toggleTheme);
  systemDark.addEventListener('change', showTheme);
  showTheme();
  byId('profile-chart').addEventListener('pointermove', followProfile);
  showLayer('thickness');
  view.set('line', { column: 0, row: map.rows >> 1 }, { column: map.columns - 1, row: map.rows >> 1 }, false);
  byId('profile-values').value = profileCsv(map, profile.samples);
  readPoint(view.cursor, false);
  redraw();
  new ResizeObserver(redraw).observe(byId('histogram'));
  document.documentElement.dataset.ready = 'true';
}

/** Charts are drawn for the width they have. */
function redraw() {
  scaleBar(byId('scale-bar'), map);
  drawHistogram(byId('histogram-chart'), map);
  profile.plot = drawProfile(byId('profile-chart'), map, profile.samples);
  const style = LAYERS[byId('map').dataset.layer];
  if (style.range) {
    colourBar(byId('bar'), map.colours, style.range(map), style.label);
  }
}

if (photo) {
  photo.decode().then(start, start);
} else {
  start();
}

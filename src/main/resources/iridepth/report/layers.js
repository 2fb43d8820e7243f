// Paints the layers of the map.

const LAYERS = {
  photo: { name: 'Photo' },
  thickness: { name: 'Thickness', values: map => map.thickness, range: map => map.thicknessRange, label: 'Thickness (nm)' },
  uncertainty: {
    name: 'Uncertainty', values: map => map.uncertainty, range: map => map.uncertaintyRange, label: 'Standard uncertainty (nm)',
  },
  state: { name: 'State' },
};
const HATCH_PERIOD = 8;
const HATCH_WIDTH = 2;

/** Colour of the hatch on a colour: lighter on dark, darker on light, so that the colour still shows. */
function hatchOn(rgb) {
  const ink = 0.3 * (rgb >> 16 & 255) + 0.6 * (rgb >> 8 & 255) < 110 ? 255 : 0;
  const mixed = shift => Math.round(0.4 * (rgb >> shift & 255) + 0.6 * ink);
  return mixed(16) << 16 | mixed(8) << 8 | mixed(0);
}

/** Colour of every point of a layer, 0xRRGGBB. */
function layerColours(map, layer) {
  const colours = new Int32Array(map.columns * map.rows);
  const { values, range } = LAYERS[layer];
  const shown = values && values(map);
  const [from, to] = range ? range(map) : [0, 1];
  const last = map.colours.length - 1;
  for (let i = 0; i < colours.length; i++) {
    const state = map.states[map.state[i]];
    if (shown && state.hasThickness && !Number.isNaN(shown[i])) {
      const share = Math.min(1, Math.max(0, (shown[i] - from) / (to - from)));
      colours[i] = map.colours[Math.round(share * last)];
    } else {
      colours[i] = state.rgb;
    }
  }
  return colours;
}

/** Paints a layer, each point as a square of `scale` dots; doubtful points of thickness and uncertainty may be hatched. */
function paintLayer(canvas, map, photo, layer, scale, hatch) {
  canvas.width = map.columns * scale;
  canvas.height = map.rows * scale;
  const context = canvas.getContext('2d');
  if (layer === 'photo') {
    context.imageSmoothingEnabled = false;
    context.drawImage(photo, 0, 0, canvas.width, canvas.height);
    return;
  }
  const image = context.createImageData(canvas.width, canvas.height);
  const colours = layerColours(map, layer);
  const hatched = hatch && layer !== 'state';
  for (let y = 0, at = 0; y < canvas.height; y++) {
    const base = Math.floor(y / scale) * map.columns;
    for (let x = 0; x < canvas.width; x++, at += 4) {
      const point = base + Math.floor(x / scale);
      let rgb = colours[point];
      if (hatched && map.states[map.state[point]].label === 'order-doubtful' && (x + y) % HATCH_PERIOD < HATCH_WIDTH) {
        rgb = hatchOn(rgb);
      }
      image.data[at] = rgb >> 16;
      image.data[at + 1] = rgb >> 8 & 255;
      image.data[at + 2] = rgb & 255;
      image.data[at + 3] = 255;
    }
  }
  context.putImageData(image, 0, 0);
}

/** Paints a layer small. */
function paintThumbnail(canvas, map, photo, layer, width) {
  const whole = document.createElement('canvas');
  paintLayer(whole, map, photo, layer, 1, false);
  canvas.width = width;
  canvas.height = Math.max(1, Math.round(width * map.rows / map.columns));
  const context = canvas.getContext('2d');
  context.imageSmoothingQuality = 'high';
  context.drawImage(whole, 0, 0, canvas.width, canvas.height);
}

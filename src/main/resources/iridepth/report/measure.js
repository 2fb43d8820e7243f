// What is measured on the map: points, lines, rectangles. Nothing here touches the page.

/** Column of the photo for a column of points; points lie `factor` pixels apart. */
function photoX(map, column) {
  return map.firstX + column * map.factor;
}

function photoY(map, row) {
  return map.firstY + row * map.factor;
}

/** The point nearest to a pixel of the photo. */
function pointAt(map, x, y) {
  const within = (v, count) => Math.min(count - 1, Math.max(0, Math.round(v)));
  return { column: within((x - map.firstX) / map.factor, map.columns), row: within((y - map.firstY) / map.factor, map.rows) };
}

/** Bilinear interpolation between the four points around a place; NaN if one that has weight has no value. */
function bilinear(map, values, column, row) {
  const i = Math.floor(column);
  const j = Math.floor(row);
  const u = column - i;
  const v = row - j;
  let sum = 0;
  for (const [di, dj, weight] of [[0, 0, (1 - u) * (1 - v)], [1, 0, u * (1 - v)], [0, 1, (1 - u) * v], [1, 1, u * v]]) {
    if (weight > 0) {
      sum += weight * values[(j + dj) * map.columns + i + di];
    }
  }
  return sum;
}

/** Rounding leaves places that are meant to lie on a point a hair beside it. */
function settled(v) {
  const whole = Math.round(v);
  return Math.abs(v - whole) < 1e-9 ? whole : v;
}

/**
 * The profile from one point to another, both included: a sample at every whole step of one point from the start, and one at the
 * end. Distances are in pixels of the photo.
 */
function profileAlong(map, from, to) {
  const across = to.column - from.column;
  const down = to.row - from.row;
  const length = Math.hypot(across, down);
  const steps = [];
  for (let k = 0; k <= length; k++) {
    steps.push(k);
  }
  if (length - steps[steps.length - 1] > 1e-9) {
    steps.push(length);
  }
  return steps.map(step => {
    const share = length === 0 ? 0 : step / length;
    const column = settled(from.column + share * across);
    const row = settled(from.row + share * down);
    return {
      distance: step * map.factor,
      column,
      row,
      thickness: bilinear(map, map.thickness, column, row),
      uncertainty: bilinear(map, map.uncertainty, column, row),
    };
  });
}

/** Count, mean, standard deviation (divisor n - 1), least, middle and greatest of the values that are numbers. */
function statistics(values) {
  const sorted = Float64Array.from(values.filter(v => !Number.isNaN(v))).sort();
  const count = sorted.length;
  const mean = sorted.reduce((sum, v) => sum + v, 0) / count;
  const squares = sorted.reduce((sum, v) => sum + (v - mean) * (v - mean), 0);
  const middle = count >> 1;
  return {
    all: values.length,
    count,
    mean,
    deviation: count > 1 ? Math.sqrt(squares / (count - 1)) : NaN,
    least: count ? sorted[0] : NaN,
    median: count === 0 ? NaN : count % 2 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2,
    greatest: count ? sorted[count - 1] : NaN,
  };
}

/** Thicknesses of all points of the rectangle between two corners, both included. */
function within(map, a, b) {
  const values = [];
  for (let row = Math.min(a.row, b.row); row <= Math.max(a.row, b.row); row++) {
    for (let column = Math.min(a.column, b.column); column <= Math.max(a.column, b.column); column++) {
      values.push(map.thickness[row * map.columns + column]);
    }
  }
  return values;
}

/** Unit of length on the photo: mm for large fields, um, or pixels where the pixel size is unknown. */
function lengthUnit(map) {
  if (map.pixelUm === null) {
    return { name: 'px', perPixel: 1, decimals: 0 };
  }
  const millimetres = Math.max(map.width, map.height) * map.pixelUm >= 5000;
  const perPixel = millimetres ? map.pixelUm / 1000 : map.pixelUm;
  return { name: millimetres ? 'mm' : 'µm', perPixel, decimals: Math.max(0, Math.ceil(-Math.log10(perPixel))) };
}

/** A whole number with its digits in groups of three where there are five or more. */
function grouped(text) {
  return text.replace(/^\d{5,}/, digits => digits.replace(/\B(?=(\d{3})+$)/g, '\u202f'));
}

function nm(value, decimals = 2) {
  return Number.isNaN(value) ? '–' : value.toFixed(decimals) + ' nm';
}

/** An uncertainty with two significant digits or more, but no more than three decimals. */
function uncertaintyText(value) {
  return Number.isNaN(value) ? '–' : nm(value, value < 0.1 ? 3 : 2);
}

// Unpacks the planes of numbers that the page carries.

/** Table by which a Huffman code is looked up: entry = symbol << 4 | length, at the code's bits in order of arrival. */
function codeTable(lengths) {
  const longest = Math.max(1, ...lengths);
  const next = new Array(17).fill(0);
  for (const length of lengths) {
    next[length + 1] += length > 0 ? 1 : 0;
  }
  for (let length = 1; length <= 16; length++) {
    next[length] = length === 1 ? 0 : next[length - 1] + next[length] << 1;
  }
  // next[l] so far is (first code of l - 1, plus its count) << 1, the first code of length l.
  const entries = new Uint16Array(1 << longest);
  lengths.forEach((length, symbol) => {
    if (length > 0) {
      let code = next[length]++;
      let reversed = 0;
      for (let i = 0; i < length; i++, code >>= 1) {
        reversed = reversed << 1 | code & 1;
      }
      for (let at = reversed; at < entries.length; at += 1 << length) {
        entries[at] = symbol << 4 | length;
      }
    }
  });
  return { entries, longest };
}

/** Inflates a stream of DEFLATE (RFC 1951) to a known size. */
function inflate(source, size) {
  const out = new Uint8Array(size);
  let at = 0;
  let held = 0;
  let count = 0;
  let end = 0;

  function fill(n) {
    while (count < n) {
      held |= source[at++] << count;
      count += 8;
    }
  }
  function bits(n) {
    fill(n);
    const value = held & (1 << n) - 1;
    held >>>= n;
    count -= n;
    return value;
  }
  function symbol(table) {
    fill(table.longest);
    const entry = table.entries[held & (1 << table.longest) - 1];
    held >>>= entry & 15;
    count -= entry & 15;
    return entry >> 4;
  }

  const LENGTH = [3, 4, 5, 6, 7, 8, 9, 10, 11, 13, 15, 17, 19, 23, 27, 31, 35, 43, 51, 59, 67, 83, 99, 115, 131, 163, 195, 227, 258];
  const DISTANCE = [1, 2, 3, 4, 5, 7, 9, 13, 17, 25, 33, 49, 65, 97, 129, 193, 257, 385, 513, 769, 1025, 1537, 2049, 3073, 4097,
    6145, 8193, 12289, 16385, 24577];
  const ORDER = [16, 17, 18, 0, 8, 7, 9, 6, 10, 5, 11, 4, 12, 3, 13, 2, 14, 1, 15];

  function stored() {
    held = count = 0;
    const length = source[at] | source[at + 1] << 8;
    out.set(source.subarray(at + 4, at + 4 + length), end);
    at += 4 + length;
    end += length;
  }
  function fixedTables() {
    const lengths = Array.from({ length: 288 }, (_, i) => i < 144 ? 8 : i < 256 ? 9 : i < 280 ? 7 : 8);
    return [codeTable(lengths), codeTable(new Array(30).fill(5))];
  }
  function dynamicTables() {
    const literals = bits(5) + 257;
    const distances = bits(5) + 1;
    const orders = bits(4) + 4;
    const first = new Array(19).fill(0);
    for (let i = 0; i < orders; i++) {
      first[ORDER[i]] = bits(3);
    }
    const table = codeTable(first);
    const lengths = [];
    while (lengths.length < literals + distances) {
      const s = symbol(table);
      const repeat = s < 16 ? 1 : s === 16 ? 3 + bits(2) : s === 17 ? 3 + bits(3) : 11 + bits(7);
      const value = s < 16 ? s : s === 16 ? lengths[lengths.length - 1] : 0;
      for (let i = 0; i < repeat; i++) {
        lengths.push(value);
      }
    }
    return [codeTable(lengths.slice(0, literals)), codeTable(lengths.slice(literals))];
  }
  function compressed([literals, distances]) {
    for (let s = symbol(literals); s !== 256; s = symbol(literals)) {
      if (s < 256) {
        out[end++] = s;
        continue;
      }
      const l = s - 257;
      const length = LENGTH[l] + (l < 8 || l === 28 ? 0 : bits((l >> 2) - 1));
      const d = symbol(distances);
      const distance = DISTANCE[d] + (d < 4 ? 0 : bits((d >> 1) - 1));
      for (let i = 0; i < length; i++, end++) {
        out[end] = out[end - distance];
      }
    }
  }

  for (let last = 0; !last && end <= size;) {
    last = bits(1);
    const kind = bits(2);
    if (kind === 0) {
      // Whole bytes already taken into `held` go back before a stored block.
      at -= count >> 3;
      stored();
    } else {
      compressed(kind === 1 ? fixedTables() : dynamicTables());
    }
  }
  return out;
}

/** The integers of a plane: differences from the left (in the first column from above), sign folded in, bytes apart. */
function unpackPlane(text, points, columns) {
  const characters = atob(text);
  const packed = new Uint8Array(characters.length);
  for (let i = 0; i < packed.length; i++) {
    packed[i] = characters.charCodeAt(i);
  }
  const bytes = inflate(packed, 4 * points);
  const values = new Int32Array(points);
  for (let i = 0; i < points; i++) {
    const folded = bytes[i] | bytes[points + i] << 8 | bytes[2 * points + i] << 16 | bytes[3 * points + i] << 24;
    const before = i % columns !== 0 ? values[i - 1] : i > 0 ? values[i - columns] : 0;
    values[i] = before + (folded >>> 1 ^ -(folded & 1));
  }
  return values;
}

/** The map that the page carries: its description with thickness, uncertainty, state and other candidates of every point. */
function readMap() {
  const map = JSON.parse(document.getElementById('data').textContent);
  const points = map.columns * map.rows;
  const plane = name => unpackPlane(document.getElementById('plane-' + name).textContent, points, map.columns);
  const stepped = (name, step) => Float32Array.from(plane(name), v => v === -0x80000000 ? NaN : v * step);
  map.thickness = new Float32Array(plane('thickness').buffer);
  map.uncertainty = stepped('uncertainty', map.uncertaintyStep);
  map.state = plane('state');
  map.others = Array.from({ length: map.alternatives }, (_, k) => stepped('alternative-' + k, map.alternativeStep));
  return map;
}

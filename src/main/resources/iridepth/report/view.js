// The map on the page: shows a layer, and turns pointer and keys into points, lines and rectangles.

class MapView {
  /**
   * @param stage  the element that holds canvas and overlay and takes the keys
   * @param map    as read from the page
   * @param photo  image of the photo, or null
   * @param listen functions told what happens: read(point), drawn(tool, shape, done), say(text), layer(name)
   */
  constructor(stage, map, photo, listen) {
    this.stage = stage;
    this.canvas = stage.querySelector('canvas');
    this.overlay = stage.querySelector('svg');
    this.map = map;
    this.photo = photo;
    this.listen = listen;
    this.scale = Math.max(1, Math.round(1000 / Math.max(map.columns, map.rows)));
    this.cursor = { column: map.columns >> 1, row: map.rows >> 1 };
    this.tool = 'line';
    this.shapes = { line: null, rectangle: null };
    this.start = null;
    this.marked = null;
    this.region = null;
    this.overlay.setAttribute('viewBox', `0 0 ${map.columns} ${map.rows}`);
    stage.addEventListener('pointerdown', event => this.press(event));
    stage.addEventListener('pointermove', event => this.move(event));
    stage.addEventListener('pointerup', () => this.release());
    stage.addEventListener('pointercancel', () => this.release());
    stage.addEventListener('keydown', event => this.key(event));
    new ResizeObserver(() => this.draw()).observe(stage);
  }

  show(layer) {
    paintLayer(this.canvas, this.map, this.photo, layer, this.scale, true);
  }

  /** The point under a pointer. */
  under(event) {
    const box = this.canvas.getBoundingClientRect();
    const place = (v, size, count) => Math.min(count - 1, Math.max(0, Math.floor(v / size * count)));
    return {
      column: place(event.clientX - box.left, box.width, this.map.columns),
      row: place(event.clientY - box.top, box.height, this.map.rows),
    };
  }

  press(event) {
    if (event.button === 0) {
      this.stage.setPointerCapture(event.pointerId);
      this.start = this.under(event);
      this.marked = null;
      this.readAt(this.start);
    }
  }

  move(event) {
    const point = this.under(event);
    this.readAt(point);
    if (this.start && (this.dragged || point.column !== this.start.column || point.row !== this.start.row)) {
      this.dragged = true;
      this.set(this.tool, this.start, point, false);
    }
  }

  release() {
    if (this.dragged) {
      const { from, to } = this.shapes[this.tool];
      this.set(this.tool, from, to, true);
    }
    this.start = null;
    this.dragged = false;
  }

  key(event) {
    const step = event.shiftKey ? 10 : 1;
    const arrows = { ArrowLeft: [-step, 0], ArrowRight: [step, 0], ArrowUp: [0, -step], ArrowDown: [0, step] };
    if (event.ctrlKey || event.altKey || event.metaKey) {
      return;
    }
    if (arrows[event.key]) {
      this.go(...arrows[event.key]);
    } else if (event.key === 'Enter' || event.key === ' ') {
      this.mark();
    } else if (event.key === 'Escape') {
      this.cancel();
    } else if (/^[lr]$/i.test(event.key)) {
      this.listen.tool(event.key.toLowerCase() === 'l' ? 'line' : 'rectangle');
    } else if (/^[1-4]$/.test(event.key)) {
      this.listen.layer(Object.keys(LAYERS)[event.key - 1]);
    } else {
      return;
    }
    event.preventDefault();
  }

  go(across, down) {
    const within = (v, count) => Math.min(count - 1, Math.max(0, v));
    this.readAt({
      column: within(this.cursor.column + across, this.map.columns),
      row: within(this.cursor.row + down, this.map.rows),
    }, true);
    if (this.marked) {
      this.set(this.tool, this.marked, this.cursor, false);
    }
  }

  /** Starts a line or rectangle at the cursor, or ends the one that has been started. */
  mark() {
    if (this.marked) {
      const from = this.marked;
      this.marked = null;
      this.set(this.tool, from, this.cursor, true);
    } else {
      this.marked = this.cursor;
      this.draw();
      this.listen.say(`The ${this.tool} starts here. Move to its end and press Enter, or Escape to drop it.`);
    }
  }

  cancel() {
    if (this.marked) {
      this.marked = null;
      this.listen.say(`The ${this.tool} is dropped.`);
      this.draw();
    }
  }

  readAt(point, spoken = false) {
    this.cursor = point;
    this.listen.read(point, spoken);
    this.draw();
  }

  /** Sets a line or rectangle from one point to another. */
  set(tool, from, to, done) {
    this.shapes[tool] = { from, to };
    this.draw();
    this.listen.drawn(tool, this.shapes[tool], done);
  }

  /** Draws cursor, line and rectangle, each dark on light so that it stands out from any colour. */
  draw() {
    const dot = this.map.columns / Math.max(1, this.overlay.clientWidth);
    const x = p => p.column + 0.5;
    const y = p => p.row + 0.5;
    this.overlay.replaceChildren();
    if (this.region) {
      const [left, top, right, bottom] = this.region;
      this.stroke('region', `M${left} ${top}H${right}V${bottom}H${left}Z`);
    }
    const { line, rectangle } = this.shapes;
    if (rectangle) {
      const across = [rectangle.from.column, rectangle.to.column].sort((p, q) => p - q);
      const down = [rectangle.from.row, rectangle.to.row].sort((p, q) => p - q);
      this.stroke('rectangle', `M${across[0]} ${down[0]}H${across[1] + 1}V${down[1] + 1}H${across[0]}Z`);
    }
    if (line) {
      this.stroke('line', `M${x(line.from)} ${y(line.from)}L${x(line.to)} ${y(line.to)}`);
      this.stroke('end', `M${x(line.from)} ${y(line.from)}h.001M${x(line.to)} ${y(line.to)}h.001`);
    }
    if (this.marked) {
      this.stroke('end', `M${x(this.marked)} ${y(this.marked)}h.001`);
    }
    const [inner, outer] = [4 * dot, 14 * dot];
    const cx = x(this.cursor);
    const cy = y(this.cursor);
    this.stroke('cursor', `M${cx - outer} ${cy}H${cx - inner}M${cx + inner} ${cy}H${cx + outer}`
      + `M${cx} ${cy - outer}V${cy - inner}M${cx} ${cy + inner}V${cy + outer}`);
  }

  stroke(style, d) {
    svgElement(this.overlay, 'path', { class: style + ' halo', d });
    svgElement(this.overlay, 'path', { class: style, d });
  }
}

/** The canvases of the cone, one above the other, and their size in CSS and device pixels. */
export class Stage {
  readonly container: HTMLElement;
  readonly points: HTMLCanvasElement;
  readonly solids: HTMLCanvasElement;
  readonly overlay: HTMLCanvasElement;
  /** Lies over the canvases and takes the pointer; nothing is painted on it. */
  readonly surface: HTMLElement;
  widthPx = 1;
  heightPx = 1;
  pixelRatio = 1;
  private readonly observer: ResizeObserver;
  private ratioQuery: MediaQueryList | null = null;
  private readonly onRatio = (): void => this.measure();
  private readonly changed: () => void;

  constructor(container: HTMLElement, changed: () => void) {
    this.container = container;
    this.changed = changed;
    // Before anything is put in: the page is laid out now, and would have to be once more after it.
    this.measure(false);
    if (getComputedStyle(container).position === 'static') container.style.position = 'relative';
    this.points = this.layer('canvas');
    this.solids = this.layer('canvas');
    this.overlay = this.layer('canvas');
    this.surface = this.layer('div');
    this.surface.style.touchAction = 'none';
    this.surface.style.pointerEvents = 'auto';
    container.append(this.points, this.solids, this.overlay, this.surface);
    this.observer = new ResizeObserver(() => this.measure());
    this.observer.observe(container);
  }

  /** Gives a canvas the size of the stage in device pixels; says whether that changed it (and emptied it). */
  fit(canvas: HTMLCanvasElement, ratio = this.pixelRatio): boolean {
    const width = Math.max(1, Math.round(this.widthPx * ratio));
    const height = Math.max(1, Math.round(this.heightPx * ratio));
    if (canvas.width === width && canvas.height === height) return false;
    canvas.width = width;
    canvas.height = height;
    return true;
  }

  dispose(): void {
    this.observer.disconnect();
    this.ratioQuery?.removeEventListener('change', this.onRatio);
    for (const layer of [this.points, this.solids, this.overlay, this.surface]) layer.remove();
  }

  /** Shows only these layers: one that is hidden costs nothing. */
  show(...layers: HTMLElement[]): void {
    for (const layer of [this.points, this.solids, this.overlay]) {
      const display = layers.includes(layer) ? 'block' : 'none';
      if (layer.style.display !== display) layer.style.display = display;
    }
  }

  private layer<K extends 'canvas' | 'div'>(kind: K): HTMLElementTagNameMap[K] {
    const layer = document.createElement(kind);
    Object.assign(layer.style, {
      position: 'absolute',
      inset: '0',
      width: '100%',
      height: '100%',
      pointerEvents: 'none',
    });
    layer.setAttribute('aria-hidden', 'true');
    return layer;
  }

  private measure(tell = true): void {
    const box = this.container.getBoundingClientRect();
    this.widthPx = Math.max(1, box.width);
    this.heightPx = Math.max(1, box.height);
    this.pixelRatio = window.devicePixelRatio || 1;
    this.ratioQuery?.removeEventListener('change', this.onRatio);
    this.ratioQuery = matchMedia(`(resolution: ${this.pixelRatio}dppx)`);
    this.ratioQuery.addEventListener('change', this.onRatio);
    if (tell) this.changed();
  }
}

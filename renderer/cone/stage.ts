/** The canvases of the cone, one above the other, and their size in CSS and device pixels. */
export class Stage {
  readonly container: HTMLElement;
  readonly points: HTMLCanvasElement;
  readonly solids: HTMLCanvasElement;
  readonly overlay: HTMLCanvasElement;
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
    this.points = this.layer();
    this.solids = this.layer();
    this.overlay = this.layer();
    this.overlay.style.touchAction = 'none';
    this.overlay.style.pointerEvents = 'auto';
    if (getComputedStyle(container).position === 'static') container.style.position = 'relative';
    container.append(this.points, this.solids, this.overlay);
    this.observer = new ResizeObserver(() => this.measure());
    this.observer.observe(container);
    this.measure(false);
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
    for (const canvas of [this.points, this.solids, this.overlay]) canvas.remove();
  }

  private layer(): HTMLCanvasElement {
    const canvas = document.createElement('canvas');
    Object.assign(canvas.style, {
      position: 'absolute',
      inset: '0',
      width: '100%',
      height: '100%',
      display: 'block',
      pointerEvents: 'none',
    });
    canvas.setAttribute('aria-hidden', 'true');
    return canvas;
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

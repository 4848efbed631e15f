/**
 * One opaque canvas for everything, drawn by the CPU. Where the page itself is put together without a GPU, every
 * further layer costs a pass over all its pixels, and lines and texts on a canvas of the GPU's cost far more than their
 * pixels: so points, solids, lines and labels are drawn into a canvas in memory, and one finished picture is put out.
 */
export class MergedCanvas {
  private readonly shown: HTMLCanvasElement;
  private readonly output: CanvasRenderingContext2D | null;
  private readonly memory: CanvasRenderingContext2D | null;

  constructor(shown: HTMLCanvasElement) {
    this.shown = shown;
    this.output = shown.getContext('2d', { alpha: false });
    const canvas = document.createElement('canvas');
    this.memory = canvas.getContext('2d', { alpha: false, willReadFrequently: true });
  }

  /** The first pixels and letters on a canvas take the browser many times what the next do: not in a picture's task. */
  warmUp(width: number, height: number, fontFamily: string): void {
    const { memory } = this;
    if (!memory) return;
    this.fit(memory.canvas, width, height);
    memory.putImageData(new ImageData(1, 1), 0, 0);
    memory.getImageData(0, 0, 1, 1);
    for (const weight of [400, 600]) {
      memory.font = `${weight} 12px ${fontFamily}`;
      memory.measureText('0.5 Gyr');
    }
  }

  /**
   * Shows the image with what is painted over it.
   *
   * @param ratio pixels of the image for one CSS pixel; `paint` works in CSS pixels
   */
  show(image: ImageData, ratio: number, paint: (context: CanvasRenderingContext2D) => void): void {
    const { memory, output, shown } = this;
    if (!memory || !output) return;
    const { width, height } = image;
    this.fit(memory.canvas, width, height);
    memory.setTransform(1, 0, 0, 1, 0, 0);
    memory.putImageData(image, 0, 0);
    memory.setTransform(ratio, 0, 0, ratio, 0, 0);
    paint(memory);
    const finished = memory.getImageData(0, 0, width, height);
    // A change of size empties the canvas: only now, when the new picture follows at once.
    this.fit(shown, width, height);
    output.putImageData(finished, 0, 0);
  }

  private fit(canvas: HTMLCanvasElement, width: number, height: number): void {
    if (canvas.width === width && canvas.height === height) return;
    canvas.width = width;
    canvas.height = height;
  }
}

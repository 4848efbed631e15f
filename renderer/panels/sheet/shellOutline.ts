/** A shell seen from the side, drawn true to scale, with the observer at the far left. */
export interface ShellOutline {
  /** SVG path in pixels. */
  readonly path: string;
  /** Where the line of sight through the middle enters and leaves, and its height: pixels. */
  readonly nearX: number;
  readonly farX: number;
  readonly middleY: number;
  readonly pxPerMpc: number;
}

/**
 * The outline of a piece of shell between two radii, `halfAngleRad` to both sides of the line of sight (pi and above:
 * all around), fitted into a box without distortion.
 *
 * @param nearMpc comoving radius, 0 or more
 * @param farMpc comoving radius, above nearMpc
 */
export function shellOutline(
  nearMpc: number,
  farMpc: number,
  halfAngleRad: number,
  box: { readonly width: number; readonly height: number },
): ShellOutline {
  const half = Math.min(Math.PI, halfAngleRad);
  const cosine = Math.cos(half);
  const left = cosine < 0 ? farMpc * cosine : nearMpc * cosine;
  const high = half > Math.PI / 2 ? farMpc : farMpc * Math.sin(half);
  const pxPerMpc = Math.min(box.width / (farMpc - left), box.height / (2 * high));
  const shift = (box.width - (farMpc - left) * pxPerMpc) / 2;
  const middleY = box.height / 2;
  const x = (mpc: number) => (mpc - left) * pxPerMpc + shift;
  const at = (radius: number, angle: number) =>
    `${round(x(radius * Math.cos(angle)))} ${round(middleY - radius * pxPerMpc * Math.sin(angle))}`;
  const arc = (radius: number, from: number, to: number) => {
    const r = round(radius * pxPerMpc);
    return `A${r} ${r} 0 ${Math.abs(to - from) > Math.PI ? 1 : 0} ${to > from ? 0 : 1} ${at(radius, to)}`;
  };
  const path =
    half >= Math.PI
      ? [farMpc, nearMpc]
          .filter((radius) => radius > 0)
          .map((radius) => `M${at(radius, 0)}${arc(radius, 0, Math.PI)}${arc(radius, Math.PI, 2 * Math.PI)}Z`)
          .join('')
      : nearMpc > 0
        ? `M${at(farMpc, -half)}${arc(farMpc, -half, half)}L${at(nearMpc, half)}${arc(nearMpc, half, -half)}Z`
        : `M${at(farMpc, -half)}${arc(farMpc, -half, half)}L${at(0, 0)}Z`;
  return { path, nearX: x(nearMpc), farX: x(farMpc), middleY, pxPerMpc };
}

/** The longest length 1, 2 or 5 times a power of ten that is not above `most`. */
export function roundLength(most: number): number {
  const power = 10 ** Math.floor(Math.log10(most));
  const digit = most / power;
  return (digit >= 5 ? 5 : digit >= 2 ? 2 : 1) * power;
}

function round(px: number): number {
  return Math.round(px * 100) / 100;
}

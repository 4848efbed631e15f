/** Small type over the size of the page's type; the same as --text-s. */
const SMALL_TYPE = 0.75;

/** The size of small type as it stands, in CSS pixels. */
export function smallTypePx(): number {
  return SMALL_TYPE * Number.parseFloat(getComputedStyle(document.documentElement).fontSize);
}

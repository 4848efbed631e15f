const RAISED: Readonly<Record<string, string>> = {
  '-': '⁻',
  '0': '⁰',
  '1': '¹',
  '2': '²',
  '3': '³',
  '4': '⁴',
  '5': '⁵',
  '6': '⁶',
  '7': '⁷',
  '8': '⁸',
  '9': '⁹',
};

/** A unit as it is printed: Mpc^-3 becomes Mpc⁻³. Only the power's writing changes. */
export function unitText(plain: string): string {
  return plain.replace(/\^(-?\d+)/g, (_, power: string) => [...power].map((c) => RAISED[c] ?? c).join(''));
}

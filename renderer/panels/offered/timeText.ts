/** Date and time on this machine's clock. Written by hand: the first text by the system's rules takes a tenth of a second. */
export function timeText(ms: number): string {
  const d = new Date(ms);
  const two = (n: number) => String(n).padStart(2, '0');
  return `${d.getFullYear()}-${two(d.getMonth() + 1)}-${two(d.getDate())}, ${two(d.getHours())}:${two(d.getMinutes())}`;
}

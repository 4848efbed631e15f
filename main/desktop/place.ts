/** The window's own scheme and place: everything it loads comes from here, and nothing else is ever loaded. */
export const SCHEME = 'conewright';
export const WINDOW_ORIGIN = `${SCHEME}://window`;
export const WINDOW_URL = `${WINDOW_ORIGIN}/index.html`;

/** The origin of an address by a real URL parser (a comparison of beginnings can be fooled); null when it has none. */
export function originOf(address: string): string | null {
  try {
    const { protocol, host } = new URL(address);
    return `${protocol}//${host}`;
  } catch {
    return null;
  }
}

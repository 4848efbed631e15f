/** What the core uses of the Encoding Standard's TextDecoder. */
export interface Decoder {
  decode(bytes?: Uint8Array, options?: { readonly stream?: boolean }): string;
}

// Browsers, workers and Node all have these two, but the ECMAScript library that the core is checked against does
// not declare them. Named here once, so that no file of the core sees the DOM or Node types.
const host = globalThis as unknown as {
  readonly TextDecoder: new (
    label: string,
    options: { readonly fatal: boolean; readonly ignoreBOM: boolean },
  ) => Decoder;
  readonly TextEncoder: new () => { encode(text: string): Uint8Array };
};

const encoder = new host.TextEncoder();

/**
 * A decoder, also for streams. Bytes that are no text of this encoding become U+FFFD; a byte-order mark is a
 * character like others. In latin1 each byte is one character.
 */
export function textDecoder(encoding: 'utf-8' | 'utf-16le' | 'utf-16be' | 'latin1'): Decoder {
  return new host.TextDecoder(encoding, { fatal: false, ignoreBOM: true });
}

/** Text as UTF-8, without a byte-order mark of its own. */
export function utf8Bytes(text: string): Uint8Array {
  return encoder.encode(text);
}

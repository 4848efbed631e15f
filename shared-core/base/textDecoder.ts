/** What the core uses of the Encoding Standard's TextDecoder. */
export interface StreamingDecoder {
  decode(bytes?: Uint8Array, options?: { readonly stream?: boolean }): string;
}

// Browsers, workers and Node all have TextDecoder, but the ECMAScript library the core is checked against does
// not declare it. Named here once, so that no file of the core sees the DOM or Node types.
const host = globalThis as unknown as {
  readonly TextDecoder: new (label: string, options: { readonly fatal: boolean }) => StreamingDecoder;
};

/** A decoder for a stream of bytes. Bytes that are not text of this encoding become U+FFFD; a BOM is dropped. */
export function streamingDecoder(encoding: 'utf-8' | 'utf-16le' | 'utf-16be'): StreamingDecoder {
  return new host.TextDecoder(encoding, { fatal: false });
}

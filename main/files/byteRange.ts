/** What part of a file a request asks for; `end` is the last byte, inclusive. */
export type ByteRange =
  | { kind: 'whole' }
  | { kind: 'part'; start: number; end: number }
  | { kind: 'outside' };

/**
 * Reads a Range header against a file of `sizeBytes` (RFC 9110, sections 14.1.2 and 14.2). A header that is no valid
 * single byte range is ignored, as section 14.2 allows: several ranges get the whole file.
 */
export function byteRange(header: string | null, sizeBytes: number): ByteRange {
  const match = /^bytes=(\d*)-(\d*)$/i.exec((header ?? '').trim());
  if (match === null) return { kind: 'whole' };
  const [, first = '', last = ''] = match;
  if (first === '' && last === '') return { kind: 'whole' };
  if (first === '') {
    const length = Math.min(Number(last), sizeBytes);
    return length === 0
      ? { kind: 'outside' }
      : { kind: 'part', start: sizeBytes - length, end: sizeBytes - 1 };
  }
  const start = Number(first);
  const end = last === '' ? sizeBytes - 1 : Math.min(Number(last), sizeBytes - 1);
  if (last !== '' && Number(last) < start) return { kind: 'whole' };
  return start >= sizeBytes ? { kind: 'outside' } : { kind: 'part', start, end };
}

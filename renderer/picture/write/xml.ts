import type { SceneMetadata } from '../scene.ts';

// What XML 1.0 (2.2) allows in no form, not even escaped.
const FORBIDDEN = /[^\t\n\r\u0020-\ud7ff\ue000-\ufffd\u{10000}-\u{10ffff}]/gu;

/** Text that means itself in XML, in contents and in quoted attributes. */
export const xmlText = (text: string): string =>
  text
    .replace(FORBIDDEN, '\ufffd')
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;');

/** Title, description, credit and the study's fingerprint as XMP (ISO 16684-1) with Dublin Core names. */
export function xmpPacket({ title, description, credit, software, fingerprint }: SceneMetadata): string {
  const said = (name: string, text: string): string =>
    `<dc:${name}><rdf:Alt><rdf:li xml:lang="x-default">${xmlText(text)}</rdf:li></rdf:Alt></dc:${name}>`;
  return (
    '<rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#"><rdf:Description rdf:about="" ' +
    'xmlns:dc="http://purl.org/dc/elements/1.1/" xmlns:xmp="http://ns.adobe.com/xap/1.0/">' +
    said('title', title) +
    said('description', description) +
    (credit === '' ? '' : said('rights', credit)) +
    `<dc:source>study sha256:${fingerprint}</dc:source><xmp:CreatorTool>${xmlText(software)}</xmp:CreatorTool>` +
    '</rdf:Description></rdf:RDF>'
  );
}

/** First bytes of files that people take for an STL by mistake; the signatures are those of the formats' own texts. */
const SIGNATURES: readonly (readonly [string, string])[] = [
  ['PK\u0003\u0004', 'It begins like a ZIP archive, as 3MF files do'],
  ['glTF', 'It begins like a GLB file'],
  ['%PDF', 'It begins like a PDF document'],
  ['\u0089PNG', 'It begins like a PNG picture'],
  ['\u00ff\u00d8\u00ff', 'It begins like a JPEG picture'],
  ['ply\n', 'It begins like a PLY file'],
  ['ply\r', 'It begins like a PLY file'],
  ['OFF\n', 'It begins like an OFF file'],
  ['ISO-10303-21', 'It begins like a STEP file'],
  ['\u001f\u008b', 'It is packed with gzip; unpack it first'],
  ['<', 'It begins like a page or an XML file'],
  ['{', 'It begins like a JSON file'],
];

/** A sentence about the kind of file that these bytes begin like, without its full stop. */
export function otherKindOfFile(bytes: Uint8Array): string | undefined {
  const start = String.fromCharCode(...bytes.subarray(0, 16));
  return SIGNATURES.find(([signature]) => start.startsWith(signature))?.[1];
}

import { zipSync } from 'fflate';

/** Parts of a package by path; text or bytes, null to leave one out. */
export type Parts = Readonly<Record<string, string | Uint8Array | null>>;

const TYPES = `<?xml version="1.0" encoding="UTF-8"?>
<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types">
<Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/>
<Default Extension="model" ContentType="application/vnd.ms-package.3dmanufacturing-3dmodel+xml"/></Types>`;

const RELATIONSHIPS = `<?xml version="1.0" encoding="UTF-8"?>
<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship
Target="/3D/3dmodel.model" Id="a"
Type="http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel"/></Relationships>`;

/** A 3MF package, written by hand and packed by a library, with parts changed or added. */
export function pack(model: string, changes: Parts = {}): Uint8Array {
  const parts: Parts = {
    '[Content_Types].xml': TYPES,
    '_rels/.rels': RELATIONSHIPS,
    '3D/3dmodel.model': model,
    ...changes,
  };
  const files: Record<string, Uint8Array> = {};
  for (const [path, part] of Object.entries(parts))
    if (part !== null) files[path] = typeof part === 'string' ? new TextEncoder().encode(part) : part;
  return zipSync(files);
}

/** A tetrahedron with legs of 10 along the axes: volume 1000/6. */
export const TETRAHEDRON = `<mesh><vertices>
<vertex x="0" y="0" z="0"/><vertex x="10" y="0" z="0"/><vertex x="0" y="10" z="0"/>
<vertex x="0" y="0" z="10"/></vertices><triangles><triangle v1="0" v2="2" v3="1"/><triangle v1="0" v2="1" v3="3"/>
<triangle v1="0" v2="3" v3="2"/><triangle v1="1" v2="2" v3="3"/></triangles></mesh>`;

export const CORE = 'xmlns="http://schemas.microsoft.com/3dmanufacturing/core/2015/02"';

export interface Pieces {
  readonly attributes?: string;
  readonly resources?: string;
  readonly build?: string;
  readonly before?: string;
}

/** A model part around resources and build; by default one tetrahedron. */
export function model({ attributes = 'unit="millimeter"', resources, build, before = '' }: Pieces = {}): string {
  const things = resources ?? `<object id="1" name="corner">${TETRAHEDRON}</object>`;
  return `<?xml version="1.0" encoding="UTF-8"?>
<model ${CORE} ${attributes}>${before}<resources>${things}</resources>
<build>${build ?? '<item objectid="1"/>'}</build></model>`;
}

/** The text of a part as `pack` writes it. */
export const partOf = (path: '[Content_Types].xml' | '_rels/.rels'): string =>
  path === '_rels/.rels' ? RELATIONSHIPS : TYPES;

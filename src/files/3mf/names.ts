/** Paths, types and namespaces of a package: 3MF Core Specification 1.4.0, sections 2.1, 2.2, 6.1 and appendix C. */

export const CONTENT_TYPES_PATH = '[Content_Types].xml';
export const RELATIONSHIPS_PATH = '_rels/.rels';
/** The specification allows any path, but a common reader opens this one by name. */
export const MODEL_PATH = '3D/3dmodel.model';
export const THUMBNAIL_PATH = 'Metadata/thumbnail.png';

export const RELATIONSHIPS_TYPE = 'application/vnd.openxmlformats-package.relationships+xml';
export const MODEL_TYPE = 'application/vnd.ms-package.3dmanufacturing-3dmodel+xml';

export const START_RELATIONSHIP = 'http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel';
export const THUMBNAIL_RELATIONSHIP = 'http://schemas.openxmlformats.org/package/2006/relationships/metadata/thumbnail';

/** Namespaces, each with the prefix that readers which compare raw names expect; the core has none in files. */
export const NAMESPACES = {
  core: 'http://schemas.microsoft.com/3dmanufacturing/core/2015/02',
  m: 'http://schemas.microsoft.com/3dmanufacturing/material/2015/02',
  p: 'http://schemas.microsoft.com/3dmanufacturing/production/2015/06',
  t: 'http://schemas.microsoft.com/3dmanufacturing/trianglesets/2021/07',
  rels: 'http://schemas.openxmlformats.org/package/2006/relationships',
  types: 'http://schemas.openxmlformats.org/package/2006/content-types',
} as const;

/** Namespace and prefix of this program's own metadata and of the identifiers of surfaces. */
export const OWN_PREFIX = 'goniolith';
export const OWN_NAMESPACE = 'urn:uuid:8534e3c3-afe2-424c-87dc-92d4efbce083';

/** Millimetres in each unit that a model may state (section 3.4). */
export const MILLIMETRES: Readonly<Record<string, number>> = {
  micron: 0.001,
  millimeter: 1,
  centimeter: 10,
  inch: 25.4,
  foot: 304.8,
  meter: 1000,
};

import { z } from 'zod';

/** More forms than any crystal shows, and few enough to answer at once. */
export const MOST_FORMS = 250;

export const LONGEST_TITLE = 120;

const lengthText = z.union([z.number(), z.string()]).describe('millimetres, or text with mm, cm, m or in');
const faceText = z
  .union([z.string(), z.number(), z.array(z.number()).min(3).max(4)])
  .describe('face indices: "111", "10-11", "1 0 -1 12", [1, 0, -1, 1], or a letter of the mineral');
const zoneText = z
  .union([z.string(), z.number(), z.array(z.number()).min(3).max(4)])
  .describe('a direction: a, b, c, "[uvw]" or [u, v, w]');

const angle = z.number().optional().describe('degrees');
const edge = z.number().optional().describe('ångström');

const cell = z
  .strictObject({
    a: edge,
    b: edge,
    c: edge,
    ratios: z.string().optional().describe('axial ratios a:b:c of older books, in place of a, b and c'),
    alpha: angle,
    beta: angle,
    gamma: angle,
  })
  .describe('what the crystal system fixes may be left out');

const formEntry = z.strictObject({
  face: faceText,
  distance: z.number().meta({ description: 'central distance, relative to the other forms', exclusiveMinimum: 0 }),
});

const sizes = [
  z.strictObject({ longest: lengthText }),
  z.strictObject({ along: zoneText, length: lengthText }),
  z.strictObject({ between: faceText, length: lengthText }),
  z.strictObject({ volume: z.union([z.number(), z.string()]).describe('mm³, or text with mm3, cm3 or ml') }),
  z.strictObject({ scale: z.number().describe('millimetres for each unit of distance') }),
] as const;
const size = z
  .union([lengthText, ...sizes])
  .describe(
    'a length alone is the longest extent; text may also be "90 mm along c", "20 mm between 100", "50 cm3", "scale 12"',
  );

const chosenAxes = z.strictObject({
  orders: z.array(z.number()).optional().describe('2, 3, 4, 6; negative: only rotoinversion axes'),
  directions: z.array(zoneText).optional(),
  fit: z
    .enum(['fused', 'separate', 'press', 'slide'])
    .optional()
    .describe('rods fused to the crystal; separate rods to push in; bores for bought metal rod to press or slide in'),
  diameter: lengthText.optional(),
  reach: lengthText.optional().describe('how far a rod stands out of the crystal'),
  depth: lengthText.optional().describe('of bores for metal rod from the surface; as deep as can be by default'),
});
const axes = z
  .union([z.boolean(), z.string(), z.number(), z.array(z.number()), chosenAxes])
  .describe('symmetry axes as rods: true or "all" for every axis, "3,2" by order, "[001]" by direction');

const length = lengthText.optional();
const hollow = z.strictObject({ kind: z.literal('hollow'), wall: length, drains: z.boolean().optional() });
const frame = z.strictObject({ kind: z.literal('frame'), strut: length, bead: z.boolean().optional() });
const halves = z.strictObject({
  kind: z.literal('halves'),
  plane: faceText
    .optional()
    .describe('the cut runs through the centre, parallel to this face; a mirror plane by default'),
  offset: z.number().optional().describe('of the cut from the centre towards that face, mm'),
  join: z.enum(['dowels', 'magnets', 'none']).optional(),
});
const sectors = z.strictObject({ kind: z.literal('sectors'), by: z.enum(['face', 'form']).optional(), gap: length });
const units = z.strictObject({ kind: z.literal('units'), gap: length });
const skins = z.strictObject({ kind: z.literal('skins'), depth: length });
const bodies = [hollow, frame, halves, sectors, units, skins] as const;
export const BODY_KINDS = ['solid', 'hollow', 'frame', 'halves', 'sectors', 'units', 'skins'] as const;
const body = z
  .union([z.enum(BODY_KINDS), ...bodies])
  .describe(
    'solid; hollow; a frame of its edges; two halves; growth sectors; asymmetric units; a core with a skin in each form’s colour',
  );

export const RELIEFS = ['engraved', 'raised', 'inlaid'] as const;
const letters = z
  .union([
    z.boolean(),
    z.enum(RELIEFS),
    z.strictObject({
      relief: z.enum(RELIEFS).optional(),
      text: z.enum(['letters', 'indices']).optional(),
    }),
  ])
  .describe('letters or indices on the faces');

const blunt = z
  .union([z.boolean(), lengthText, z.strictObject({ radius: length, bevel: length })])
  .describe('edges and corners blunted: a rounding radius, or { bevel: width }');

const stand = z
  .union([
    z.boolean(),
    z.strictObject({
      text: z.array(z.string()).optional(),
      braille: z.boolean().optional(),
      qr: z.string().optional(),
      down: faceText.optional().describe('the face on which the crystal rests; without it c stands upright'),
      contrast: z.boolean().optional().describe('letters and code as parts of their own, for a second colour'),
    }),
  ])
  .describe('a stand that holds the crystal, with a label');

const base = z
  .union([z.string(), z.array(z.string())])
  .describe('lines engraved under the resting face, such as an accession number');

const planes = z
  .union([
    z.boolean(),
    z.enum(RELIEFS),
    z.strictObject({ relief: z.enum(RELIEFS).optional(), width: length, depth: length }),
  ])
  .describe('mirror planes as great lines on the surface; inlaid: as strips in a second colour');

const print = z.strictObject({
  size: size.optional(),
  axes: axes.optional(),
  body: body.optional(),
  letters: letters.optional(),
  blunt: blunt.optional(),
  stand: stand.optional(),
  base: base.optional(),
  planes: planes.optional(),
  key: z.boolean().optional().describe('a printed key of what the symbols at the rods mean'),
  pair: z.boolean().optional().describe('two copies: one plain, one with axes and lettered faces'),
  flat: z.boolean().optional().describe('parts turned onto the face on which they print best'),
  checks: z.boolean().optional().describe('what to know before printing and handling, measured'),
  printer: z.string().optional().describe('a printer profile'),
  files: z
    .array(z.enum(['stl', '3mf', 'glb', 'png']))
    .min(1)
    .optional(),
  stl: z.enum(['binary', 'text']).optional(),
  file: z.string().optional().describe('file name without ending'),
});

/** What a person may write. Meaning is checked afterwards, in `resolve.ts`. */
export const recipeSchema = z.strictObject({
  title: z
    .string()
    .min(1)
    .max(LONGEST_TITLE)
    .regex(/^[^\p{Cc}]*$/u)
    .optional(),
  mineral: z.string().optional().describe('a mineral preset'),
  habit: z.string().optional().describe("one of the mineral's habits"),
  pointGroup: z.union([z.string(), z.number()]).optional().describe('Hermann–Mauguin or Schoenflies symbol'),
  cell: cell.optional(),
  forms: z.array(formEntry).max(MOST_FORMS).optional(),
  print: print.optional(),
  note: z.string().optional(),
});

/** The keys known at each place of a recipe, places in lists left out. */
export const KNOWN_KEYS: Readonly<Record<string, readonly string[]>> = {
  '': Object.keys(recipeSchema.shape),
  cell: Object.keys(cell.shape),
  forms: Object.keys(formEntry.shape),
  print: Object.keys(print.shape),
  'print.size': [...new Set(sizes.flatMap(({ shape }) => Object.keys(shape)))],
  'print.axes': Object.keys(chosenAxes.shape),
  'print.body': [...new Set(bodies.flatMap(({ shape }) => Object.keys(shape)))],
  'print.letters': ['relief', 'text'],
  'print.blunt': ['radius', 'bevel'],
  'print.stand': ['text', 'braille', 'qr', 'down', 'contrast'],
  'print.planes': ['relief', 'width', 'depth'],
};

export type RecipeInput = z.input<typeof recipeSchema>;
export type CellInput = z.input<typeof cell>;
export type SizeInput = z.input<typeof size>;
export type BodyInput = z.input<typeof body>;
export type LettersInput = z.input<typeof letters>;
export type BluntInput = z.input<typeof blunt>;
export type StandInput = z.input<typeof stand>;
export type BaseInput = z.input<typeof base>;
export type PlanesInput = z.input<typeof planes>;
export type AxesInput = z.input<typeof axes>;
export type FaceInput = z.input<typeof faceText>;
export type ZoneInput = z.input<typeof zoneText>;

const citation = z.string().min(10);

/** A mineral's file in `presets/minerals`. */
export const mineralSchema = z.strictObject({
  name: z.string(),
  formula: z.string(),
  family: z.string().optional(),
  pointGroup: z.string(),
  cell,
  source: citation.describe('where the cell comes from'),
  note: citation.describe('where the forms come from, and that the distances are chosen for looks'),
  letters: z.record(z.string(), z.string()),
  habits: z.record(z.string(), z.strictObject({ about: z.string(), forms: z.array(formEntry).min(1) })),
});
export type MineralPreset = z.infer<typeof mineralSchema>;

/** A set's file in `presets/sets`: many small recipes under one heading. */
export const setSchema = z.strictObject({
  name: z.string(),
  source: citation,
  note: citation,
  recipes: z.record(z.string(), recipeSchema),
});
export type SetPreset = z.infer<typeof setSchema>;

const lettering = z.strictObject({
  stroke: z.number().describe('thinnest stroke that prints'),
  depth: z.number().describe('how deep engraved letters go, or how far raised ones stand out'),
});

/** A printer's file in `presets/printers`. All lengths in millimetres. */
export const printerSchema = z.strictObject({
  name: z.string(),
  source: citation,
  bed: z.tuple([z.number(), z.number(), z.number()]).describe('largest object: width, depth, height'),
  wall: z.number().describe('thinnest wall that prints'),
  usualWall: z.number().describe('thinnest wall that is advised'),
  hollowWall: z.number().describe('wall of hollow bodies'),
  feature: z.number().describe('thinnest feature, such as an edge or a face, that comes out at all'),
  overhang: z.number().describe('faces that lean farther than this from the vertical need support, degrees'),
  rod: z.strictObject({
    diameter: z.number().describe('usual rod'),
    smallest: z.number().describe('thinnest rod that prints'),
    clearance: z.number().describe('bore diameter minus rod diameter, for a push fit to be glued'),
    press: z.number().describe('the same for bought metal rod that stays, glued in resin'),
    slide: z.number().describe('the same for bought metal rod that slides'),
  }),
  freeClearance: z.number().describe('gap of parts that slide or lift out'),
  drains: z
    .strictObject({ diameter: z.number(), count: z.number() })
    .nullable()
    .describe('holes through which resin runs out of hollow bodies'),
  engraved: lettering,
  raised: lettering,
  material: z.strictObject({
    name: z.string(),
    density: z.number().describe('g/cm³'),
    shell: z.number().describe('thickness of the solid shell'),
    infill: z.number().describe('share of the inside that is filled'),
  }),
  speed: z.strictObject({
    layer: z.number().describe('thickness of a layer'),
    perLayer: z.number().describe('seconds that each layer takes besides laying down material'),
    flow: z.number().nullable().describe('mm³/s; null where a layer takes the same time whatever is in it'),
  }),
});
export type PrinterProfile = z.infer<typeof printerSchema>;

/** Words that an editor can offer while one types. */
export interface KnownWords {
  readonly minerals: readonly string[];
  readonly printers: readonly string[];
  readonly pointGroups: readonly string[];
}

/** The recipe as JSON Schema, for editors that complete and check YAML while one types. */
export function recipeJsonSchema(known?: KnownWords): object {
  const schema = z.toJSONSchema(recipeSchema, { io: 'input' });
  if (known) {
    offer(schema.properties?.mineral, known.minerals);
    offer(schema.properties?.pointGroup, known.pointGroups);
    const print = schema.properties?.print;
    if (typeof print === 'object') offer(print.properties?.printer, known.printers);
  }
  const example = { mineral: 'quartz', habit: 'prismatic', print: { size: '90 mm along c', axes: 'all' } };
  return { title: 'Goniolith recipe', ...schema, examples: [example] };
}

/** Examples, not an enumeration: other spellings are read too. */
function offer(property: unknown, words: readonly string[]): void {
  if (typeof property === 'object' && property !== null) Object.assign(property, { examples: words });
}

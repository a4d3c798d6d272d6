import { nearest } from '../crystal/nearest.ts';
import type { PointGroup } from '../crystal/point-group.ts';
import { readBase, readBlunt, readBody, readLetters, readPlanes, readStand } from './body-plan.ts';
import type { BluntPlan, BodyPlan, LettersPlan, PlanesPlan, PrintPlan, StandPlan } from './crystal.ts';
import { either } from './either.ts';
import { readAxes, readSize } from './print-plan.ts';
import type { ProblemList } from './problem-list.ts';
import type {
  BaseInput,
  BluntInput,
  BodyInput,
  LettersInput,
  PlanesInput,
  PrinterProfile,
  RecipeInput,
  StandInput,
} from './schema.ts';
import { preset, type Shelf } from './shelf.ts';

const USUAL_PRINTER = 'fdm-0.4';

/** The recipe's `print`; undefined when something in it is wrong. */
export function readPrint(
  { print = {} }: RecipeInput,
  group: PointGroup | undefined,
  shelf: Shelf,
  problems: ProblemList,
): PrintPlan | undefined {
  const { size: wanted, axes: chosen, file: name } = print;
  const printer = readPrinter(print.printer ?? USUAL_PRINTER, shelf, problems);
  const size = wanted === undefined ? null : problems.attempt('size', ['print', 'size'], () => readSize(wanted, group));
  const rod = (printer ?? FALLBACK_PRINTER).rod;
  const axes =
    chosen === undefined
      ? null
      : problems.attempt('axes', ['print', 'axes'], () => readAxes(chosen, group, rod.diameter));
  const file = name === undefined ? null : readFileName(name, problems);
  const read = <I, T>(
    key: keyof typeof print,
    input: I | undefined,
    otherwise: T,
    step: (input: I) => T,
  ): T | undefined => (input === undefined ? otherwise : problems.attempt('object', ['print', key], () => step(input)));
  const body = read<BodyInput, BodyPlan>('body', print.body, { kind: 'solid' }, (input) => readBody(input, group));
  const letters = read<LettersInput, LettersPlan | null>('letters', print.letters, null, readLetters);
  const blunt = read<BluntInput, BluntPlan | null>('blunt', print.blunt, null, readBlunt);
  const stand = read<StandInput, StandPlan | null>('stand', print.stand, null, (input) => readStand(input, group));
  const base = read<BaseInput, readonly string[] | null>('base', print.base, null, readBase);
  const planes = read<PlanesInput, PlanesPlan | null>('planes', print.planes, null, readPlanes);
  if (!printer || size === undefined || axes === undefined || file === undefined) return undefined;
  if (!body || letters === undefined || blunt === undefined || stand === undefined) return undefined;
  if (base === undefined || planes === undefined) return undefined;
  const { key = false, pair = false, flat = false, checks = false, files = ['stl'], stl = 'binary' } = print;
  return {
    size,
    axes,
    body,
    letters,
    blunt,
    stand,
    base,
    planes,
    key,
    pair,
    flat,
    checks,
    printer,
    files: [...new Set(files)],
    stl,
    file,
  };
}

function readPrinter(name: string, shelf: Shelf, problems: ProblemList): PrinterProfile | undefined {
  const profile = preset(shelf, 'printers', name);
  if (profile) return profile;
  const known = shelf.list('printers');
  if (known.length === 0) return FALLBACK_PRINTER;
  const [guess] = nearest(name, known, 1);
  const hint = `${guess ? `Did you mean ${guess}? ` : ''}There are ${either(known, 'and')}.`;
  problems.say('unknown-printer', ['print', 'printer'], `no printer profile "${name}"`, hint);
  return undefined;
}

/** What a recipe is read with where no printer profiles are at hand: an ordinary filament printer, 0.4 mm nozzle. */
const FALLBACK_PRINTER: PrinterProfile = {
  name: 'Filament printer, 0.4 mm nozzle',
  source: 'start values of presets/printers/fdm-0.4.yaml',
  bed: [220, 220, 250],
  wall: 0.8,
  usualWall: 1.2,
  hollowWall: 2,
  feature: 0.4,
  overhang: 45,
  rod: { diameter: 3, smallest: 1.8, clearance: 0.2, press: 0.1, slide: 0.3 },
  freeClearance: 0.4,
  drains: null,
  engraved: { stroke: 0.6, depth: 0.6 },
  raised: { stroke: 0.8, depth: 0.6 },
  material: { name: 'PLA', density: 1.24, shell: 0.9, infill: 0.15 },
  speed: { layer: 0.2, perLayer: 4, flow: 8 },
};

function readFileName(name: string, problems: ProblemList): string | undefined {
  if (/^[\p{L}\p{N}][\p{L}\p{N} ._-]{0,99}$/u.test(name) && !/[. ]$/.test(name)) return name;
  const hint = 'Use letters, digits, blanks, - and _; a name has no folder in it.';
  problems.say('file-name', ['print', 'file'], `"${name}" cannot be a file name here`, hint);
  return undefined;
}

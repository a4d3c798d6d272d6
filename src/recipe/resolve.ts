import { fromAxialRatios } from '../crystal/axial-ratios.ts';
import { type Cell, metric } from '../crystal/cell.ts';
import { completeCell } from '../crystal/complete-cell.ts';
import { CrystalError } from '../crystal/errors.ts';
import { form } from '../crystal/form.ts';
import { parseFace, readOptions } from '../crystal/indices.ts';
import { nearest } from '../crystal/nearest.ts';
import { type PointGroup, pointGroup } from '../crystal/point-group.ts';
import type { Miller } from '../crystal/spaces.ts';
import type { Crystal, CrystalForm, MineralFacts, PrintPlan, Resolved } from './crystal.ts';
import { readAxes, readSize } from './print-plan.ts';
import { type Origin, type Path, type Problem, type ProblemCode, RecipeError } from './problem.ts';
import { QuantityError } from './quantity.ts';
import type { CellInput, FaceInput, MineralPreset, PrinterProfile, RecipeInput } from './schema.ts';
import { either, preset, type Shelf, unknownHabit, unknownMineral } from './shelf.ts';
import type { Written } from './text.ts';

export const USUAL_PRINTER = 'fdm-0.4';
const DISTANCES = { least: 1e-6, most: 1e6 };

/**
 * Understands a recipe: looks up presets, reads symbols, completes the cell.
 * @param faults what `structureProblems` found in it; presets need no such look. It is handed in because the library
 * behind it takes longer to load than a crystal takes to compute.
 * @throws RecipeError with every problem found, each with its place
 */
export function resolve(written: Written, shelf: Shelf, faults: readonly Problem[] = []): Resolved {
  return new Reading(written, shelf, faults).result();
}

type ChosenMineral = MineralPreset & { readonly id: string; readonly habit: string };

/** One recipe being read. Problems are collected, so that a person hears of all of them at once. */
class Reading {
  private readonly problems: Problem[];
  private readonly recipe: RecipeInput;
  private readonly origin: Origin;

  constructor(
    written: Written,
    private readonly shelf: Shelf,
    faults: readonly Problem[],
  ) {
    this.origin = written.origin;
    this.problems = [...faults];
    this.recipe = (typeof written.value === 'object' && written.value !== null ? written.value : {}) as RecipeInput;
  }

  result(): Resolved {
    const mineral = this.mineral();
    const group = this.group(mineral);
    const cell = group && this.cell(mineral, group);
    const forms = group && this.forms(mineral, group);
    const print = this.print(group);
    if (this.problems.length > 0 || !group || !cell || !forms || !print)
      throw new RecipeError(this.origin, this.problems);
    const facts = mineral && factsOf(mineral);
    const title =
      this.recipe.title ?? (facts ? `${facts.name}, ${facts.habit}` : `Crystal of point group ${group.hermannMauguin}`);
    const crystal: Crystal = { title, mineral: facts, group, cell, metric: metric(cell, group.axes), forms };
    return { crystal, print };
  }

  /** Runs one reading step; a fault in the person's input becomes a problem at `path`. */
  private attempt<T>(code: ProblemCode, path: Path, step: () => T): T | undefined {
    if (this.problems.some((known) => samePlace(known.path, path))) return undefined;
    try {
      return step();
    } catch (error) {
      if (!(error instanceof CrystalError || error instanceof QuantityError)) throw error;
      const place = error instanceof QuantityError && error.key ? [...path, error.key] : path;
      this.say(code, place, error.message, error.hint);
      return undefined;
    }
  }

  private say(code: ProblemCode, path: Path, message: string, hint?: string): void {
    const sentence = message.endsWith('.') ? message : `${message}.`;
    this.problems.push({ code, message: sentence, ...(hint && { hint: asSentence(hint) }), path });
  }

  private mineral(): ChosenMineral | null {
    const { mineral: id, habit } = this.recipe;
    if (typeof id !== 'string') {
      if (habit !== undefined)
        this.say('missing', ['habit'], 'a habit belongs to a mineral, and none is given', 'Add mineral: and its name.');
      return null;
    }
    const found = preset(this.shelf, 'minerals', id.toLowerCase());
    if (!found) {
      const { message, hint } = unknownMineral(this.shelf, id);
      this.say('unknown-mineral', ['mineral'], message, hint);
      return null;
    }
    const habits = Object.keys(found.habits);
    if (habit === undefined || habit in found.habits)
      return { ...found, id: id.toLowerCase(), habit: habit ?? habits[0]! };
    const { message, hint } = unknownHabit(id, habit, habits);
    this.say('unknown-habit', ['habit'], message, hint);
    return null;
  }

  private group(mineral: MineralPreset | null): PointGroup | undefined {
    const symbol = this.recipe.pointGroup ?? mineral?.pointGroup;
    if (symbol === undefined) {
      if (this.recipe.mineral === undefined)
        this.say(
          'missing',
          [],
          'neither a mineral nor a pointGroup is given',
          'Add one of them, for instance  mineral: quartz  or  pointGroup: m-3m',
        );
      return undefined;
    }
    return this.attempt('unknown-group', ['pointGroup'], () => {
      const group = pointGroup(String(symbol));
      return group.system === 'trigonal' && group.axes === 'hexagonal' && isRhombohedral(this.recipe.cell)
        ? pointGroup(`${group.hermannMauguin}:R`)
        : group;
    });
  }

  private cell(mineral: MineralPreset | null, group: PointGroup): Cell | undefined {
    const given = this.recipe.cell ?? mineral?.cell;
    return this.attempt('cell', ['cell'], () => {
      if (given === undefined) return defaultCell(group);
      const { ratios, ...edges } = given;
      if (ratios === undefined) return completeCell(defined(edges), group.axes);
      const { alpha, beta, gamma } = edges;
      return fromAxialRatios(ratios, group.axes, defined({ alpha, beta, gamma }));
    });
  }

  private forms(mineral: ChosenMineral | null, group: PointGroup): CrystalForm[] | undefined {
    const own = this.recipe.forms;
    const given = own ?? mineral?.habits[mineral.habit]?.forms;
    if (!Array.isArray(given) || given.length === 0) {
      if (mineral || this.recipe.mineral === undefined)
        this.say(
          'missing',
          own === undefined ? [] : ['forms'],
          'no forms are given',
          'Add forms: with at least one line such as  - { face: "111", distance: 1 }',
        );
      return undefined;
    }
    if (this.problems.some(({ path, code }) => path.length === 1 && path[0] === 'forms' && code === 'too-large'))
      return undefined;
    const letters = lettersByForm(mineral, group);
    return given.flatMap((entry, place) => {
      const path: Path = own ? ['forms', place] : ['habit'];
      if (typeof entry !== 'object' || entry === null) return [];
      const face = this.attempt('index', [...path, 'face'], () => this.face(entry.face, mineral, group));
      const distance = this.distance(entry.distance, [...path, 'distance']);
      if (!face || distance === undefined) return [];
      const made = form(group, face);
      return [{ form: made, distance, letter: letters.get(canonical(made.faces)) ?? null }];
    });
  }

  private face(input: FaceInput, mineral: MineralPreset | null, group: PointGroup): Miller {
    const options = readOptions(group.axes);
    if (Array.isArray(input)) return parseFace(input, options);
    const text = String(input).trim();
    const byLetter = mineral && this.recipe.pointGroup === undefined ? mineral.letters[text] : undefined;
    if (byLetter !== undefined) return parseFace(byLetter, options);
    if (/^\p{L}\p{M}?['′]?$/u.test(text)) throw unknownLetter(text, mineral);
    return parseFace(text, options);
  }

  private distance(value: unknown, path: Path): number | undefined {
    if (this.problems.some((known) => samePlace(known.path, path))) return undefined;
    const { least, most } = DISTANCES;
    if (typeof value === 'number' && value >= least && value <= most) return value;
    const is =
      typeof value === 'number'
        ? `a central distance of ${value} puts the face ${value < 0 ? 'behind the centre' : value === 0 ? 'through the centre' : 'nowhere'}`
        : 'the central distance is not a number';
    const message =
      typeof value === 'number' && value > 0 && Number.isFinite(value)
        ? `a central distance of ${value} is out of bounds`
        : is;
    this.say(
      'distance',
      path,
      message,
      `Give a number between ${least} and ${most}; only ratios between distances count.`,
    );
    return undefined;
  }

  private print(group: PointGroup | undefined): PrintPlan | undefined {
    const given = this.recipe.print ?? {};
    const printer = this.printer(given.printer ?? USUAL_PRINTER);
    const size =
      given.size === undefined ? null : this.attempt('size', ['print', 'size'], () => readSize(given.size!, group));
    const axes =
      given.axes === undefined || !printer
        ? null
        : this.attempt('axes', ['print', 'axes'], () => readAxes(given.axes!, group, printer));
    const file = given.file === undefined ? null : this.fileName(given.file);
    if (!printer || size === undefined || axes === undefined || file === undefined) return undefined;
    return { size, axes, printer, stl: given.stl ?? 'binary', file };
  }

  private printer(name: string): PrinterProfile | undefined {
    const profile = preset(this.shelf, 'printers', name);
    if (profile) return profile;
    const known = this.shelf.list('printers');
    if (known.length === 0) return FALLBACK_PRINTER;
    this.say(
      'unknown-printer',
      ['print', 'printer'],
      `no printer profile "${name}"`,
      `Did you mean ${either(nearest(name, known, 1))}? There are ${either(known, 'and')}.`,
    );
    return undefined;
  }

  private fileName(name: string): string | undefined {
    const path = ['print', 'file'];
    if (/^[\p{L}\p{N}][\p{L}\p{N} ._-]{0,99}$/u.test(name) && !/[. ]$/.test(name)) return name;
    this.say(
      'file-name',
      path,
      `"${name}" cannot be a file name here`,
      'Use letters, digits, blanks, - and _; the folder is chosen with --out.',
    );
    return undefined;
  }
}

function factsOf({ id, name, formula, habit, habits, source }: ChosenMineral): MineralFacts {
  return { id, name, formula, habit, firstHabit: Object.keys(habits)[0]!, source };
}

/** What a recipe is read with where no printer profiles are at hand: an ordinary filament printer, 0.4 mm nozzle. */
const FALLBACK_PRINTER: PrinterProfile = {
  name: 'Filament printer, 0.4 mm nozzle',
  source: 'start values of presets/printers/fdm-0.4.yaml',
  bed: [220, 220, 250],
  rod: { diameter: 3, smallest: 1.8, clearance: 0.2 },
};

function samePlace(known: Path, path: Path): boolean {
  return (
    known.length <= path.length && known.length > 0 && known.every((key, i) => key === path[i] || key === `?${path[i]}`)
  );
}

/** Hints that end in a line to copy, set off by two blanks, get no full stop that would be copied too. */
function asSentence(text: string): string {
  const ended = /[.?!]$/.test(text) || text.includes('  ') ? text : `${text}.`;
  return ended.charAt(0).toUpperCase() + ended.slice(1);
}

function defined<T extends object>(values: T): { [K in keyof T]?: Exclude<T[K], undefined> } {
  return Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined)) as {
    [K in keyof T]?: Exclude<T[K], undefined>;
  };
}

/** A trigonal cell is read on rhombohedral axes when it states an angle alpha other than 90°. */
const isRhombohedral = (cell: CellInput | undefined): boolean =>
  typeof cell?.alpha === 'number' && cell.alpha !== 90 && (cell.gamma === undefined || cell.gamma === cell.alpha);

/** Cubic crystals have one shape of cell; all others must state theirs. */
function defaultCell(group: PointGroup): Cell {
  if (group.axes === 'cubic') return completeCell({ a: 1 }, group.axes);
  throw new CrystalError(
    'cell-incomplete',
    `point group ${group.key} needs a cell, and none is given`,
    'add cell: with a, b, c in ångström and the angles that the system leaves free',
  );
}

const canonical = (faces: readonly Miller[]): string => faces.map(String).sort()[0]!;

function lettersByForm(mineral: MineralPreset | null, group: PointGroup): Map<string, string> {
  if (!mineral || mineral.pointGroup !== group.key) return new Map();
  const options = readOptions(group.axes);
  return new Map(
    Object.entries(mineral.letters).map(([letter, face]) => [
      canonical(form(group, parseFace(face, options)).faces),
      letter,
    ]),
  );
}

function unknownLetter(letter: string, mineral: MineralPreset | null): CrystalError {
  const known = Object.entries(mineral?.letters ?? {}).map(([name, face]) => `${name} {${face}}`);
  return new CrystalError(
    'index-text',
    `"${letter}" names no face here`,
    known.length
      ? `the letters of this mineral are ${known.join(', ')}`
      : 'letters need a mineral; give indices such as "111"',
  );
}

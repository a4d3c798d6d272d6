import type { Cell } from './crystal/cell.ts';
import { symmetryElements } from './crystal/elements.ts';
import { printFace } from './crystal/indices.ts';
import { edges, faceCorners } from './polyhedron/measures.ts';
import type { MineralFacts, Resolved } from './recipe/crystal.ts';
import { closingAdvice } from './shape/closing.ts';
import { shownForms, vanishesAt } from './shape/presence.ts';
import { millimetresPerUnit } from './shape/scale.ts';
import { type ClosedShape, isClosed, type Shape } from './shape/shape.ts';

type Triple = [number, number, number];

/** Everything known about a crystal, as plain data. */
export interface Inspection {
  title: string;
  mineral: {
    id: string;
    name: string;
    formula: string;
    /** Null when the recipe gives forms of its own. */
    habit: string | null;
    /** Where the cell comes from; null when the recipe gives a cell or group of its own. */
    source: string | null;
  } | null;
  cell: Cell;
  pointGroup: {
    /** One of the 32 Hermann–Mauguin symbols. */
    hermannMauguin: string;
    /** The same on the axes in use, for instance 321 or -4m2. */
    setting: string;
    schoenflies: string;
    order: number;
    system: string;
    centrosymmetric: boolean;
    polar: boolean;
    chiral: boolean;
    /** Rows first; they act on columns of cell coordinates. */
    operations: number[][][];
  };
  elements: {
    centre: boolean;
    axes: { order: number; rotoinversion: boolean; direction: Triple }[];
    mirrorPlanes: { normal: Triple }[];
    /** Each line once, under the one symbol of all that sits on it. */
    lines: { symbol: string; direction: Triple; polar: boolean }[];
  };
  /** In the recipe's order. */
  forms: {
    indices: Triple;
    symbol: string;
    letter: string | null;
    name: string;
    position: string;
    multiplicity: number;
    closed: boolean;
    enantiomorph: Triple | null;
    distance: number;
    appears: boolean;
    /** Below this distance the form shows, from it on it does not; null when the others leave room without end. */
    vanishesAt: number | null;
    facesShown: number;
    /** Of all its faces together, in squared units of distance. */
    area: number;
  }[];
  /** Faces that appear: form (its place in `forms`), area, the vertices around it counter-clockwise from outside. */
  faces: { indices: Triple; form: number; area: number; corners: number[]; distance: number }[];
  /** In cell coordinates. */
  vertices: Triple[];
  bounded: boolean;
  openAlong?: Triple[];
  /** What would close an open crystal. */
  advice?: string;
  /** In the recipe's own units of distance. */
  solid?: {
    faces: number;
    edges: number;
    vertices: number;
    volume: number;
    area: number;
    centroid: Triple;
    inscribedRadius: number;
    circumscribedRadius: number;
    /** Kinds of edges: the two forms, angle between normals and inside the solid, degrees, and how many. */
    angles: { forms: [number, number]; interfacial: number; dihedral: number; edges: number }[];
  };
  /** In millimetres, when the recipe states a size. */
  object?: { millimetresPerUnit: number; volume: number; area: number; extents: Triple };
}

/** Gathers what is known about a crystal; never fails on an open one. */
export function inspection({ crystal, print }: Resolved, shape: Shape): Inspection {
  const { group, mineral } = crystal;
  const elements = symmetryElements(group);
  return {
    title: crystal.title,
    mineral: mineral && mineralFacts(mineral),
    cell: crystal.cell,
    pointGroup: {
      hermannMauguin: group.hermannMauguin,
      setting: group.key,
      schoenflies: group.schoenflies,
      order: group.order,
      system: group.system,
      centrosymmetric: group.centrosymmetric,
      polar: group.polar,
      chiral: group.chiral,
      operations: group.operations.map(({ matrix }) => matrix.map((row) => [...row])),
    },
    elements: {
      centre: elements.centre,
      axes: elements.axes.map((axis) => ({ ...axis, direction: copy(axis.direction) })),
      mirrorPlanes: elements.mirrorPlanes.map(({ plane }) => ({ normal: copy(plane) })),
      lines: elements.lines.map((line) => ({ ...line, direction: copy(line.direction) })),
    },
    forms: formRows(shape),
    ...(isClosed(shape) ? closedParts(shape) : openParts(shape)),
    ...(isClosed(shape) && print.size && { object: objectOf(shape, millimetresPerUnit(shape, print.size)) }),
  };
}

const mineralFacts = ({ id, name, formula, habit, source }: MineralFacts): Inspection['mineral'] => ({
  id,
  name,
  formula,
  habit,
  source,
});

function formRows({ crystal, solid, measures }: Shape): Inspection['forms'] {
  const shown = shownForms(solid);
  return crystal.forms.map(({ form, distance, letter }, place) => {
    const planes = [...solid.planes.form.keys()].filter((plane) => solid.planes.form[plane] === place);
    return {
      indices: copy(form.indices),
      symbol: printFace(form.indices, crystal.group.axes, { brackets: '{' }),
      letter,
      name: form.name,
      position: form.position,
      multiplicity: form.multiplicity,
      closed: form.closed,
      enantiomorph: form.enantiomorph && copy(form.enantiomorph),
      distance,
      appears: shown[place]!,
      vanishesAt: vanishesAt(crystal, place),
      facesShown: planes.filter((plane) => solid.start[plane] !== solid.start[plane + 1]).length,
      area: measures ? planes.reduce((sum, plane) => sum + measures.area[plane]!, 0) : 0,
    };
  });
}

function closedParts(shape: ClosedShape): Pick<Inspection, 'faces' | 'vertices' | 'bounded' | 'solid'> {
  const { crystal, solid, measures } = shape;
  const vertices = Array.from({ length: solid.vertices.length / 3 }, (_, i) => tripleAt(solid.vertices, i));
  return {
    bounded: true,
    faces: measures.faces.map((plane) => {
      const form = solid.planes.form[plane]!;
      return {
        indices: tripleAt(solid.planes.normals, plane),
        form,
        area: measures.area[plane]!,
        corners: faceCorners(solid, plane),
        distance: crystal.forms[form]!.distance,
      };
    }),
    vertices,
    solid: {
      faces: measures.faces.length,
      edges: solid.neighbour.length / 2,
      vertices: vertices.length,
      volume: measures.volume,
      area: measures.surface,
      centroid: copy(measures.centroid),
      inscribedRadius: measures.inscribedRadius,
      circumscribedRadius: measures.circumscribedRadius,
      angles: angleTable(shape),
    },
  };
}

function openParts(shape: Shape): Pick<Inspection, 'faces' | 'vertices' | 'bounded' | 'openAlong' | 'advice'> {
  return {
    bounded: false,
    faces: [],
    vertices: [],
    openAlong: shape.openAlong.map(copy),
    advice: closingAdvice(shape),
  };
}

/** Angles at the solid's edges; those that agree to a millionth of a degree between the same two forms are one kind. */
function angleTable({ solid, measures }: ClosedShape): NonNullable<Inspection['solid']>['angles'] {
  const kinds = new Map<string, { forms: [number, number]; interfacial: number; dihedral: number; edges: number }>();
  for (const { faces, dihedral } of edges(solid, measures)) {
    const [a, b] = faces.map((plane) => solid.planes.form[plane]!).sort((p, q) => p - q) as [number, number];
    const key = `${a} ${b} ${dihedral.toFixed(6)}`;
    const kind = kinds.get(key);
    if (kind) kind.edges += 1;
    else kinds.set(key, { forms: [a, b], interfacial: 180 - dihedral, dihedral, edges: 1 });
  }
  return [...kinds.values()].sort(
    (p, q) => p.forms[0] - q.forms[0] || p.forms[1] - q.forms[1] || p.interfacial - q.interfacial,
  );
}

function objectOf({ measures }: ClosedShape, scale: number): NonNullable<Inspection['object']> {
  const { low, high } = measures;
  return {
    millimetresPerUnit: scale,
    volume: measures.volume * scale ** 3,
    area: measures.surface * scale ** 2,
    extents: [(high[0] - low[0]) * scale, (high[1] - low[1]) * scale, (high[2] - low[2]) * scale],
  };
}

const tripleAt = (values: ArrayLike<number>, index: number): Triple => [
  values[3 * index]!,
  values[3 * index + 1]!,
  values[3 * index + 2]!,
];

const copy = ([a, b, c]: readonly [number, number, number]): Triple => [a, b, c];

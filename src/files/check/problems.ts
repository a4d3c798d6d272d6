import type { Body, Finding, MeshReport, Point, Problem, ProblemCode } from './report.ts';

/** The report without its verdict. */
export type MeshFacts = Omit<MeshReport, 'ok' | 'problems'>;

/** What is wrong, in a person's words: how often, where first, what it means for printing. */
export function problemsOf(facts: MeshFacts): Problem[] {
  if (facts.triangles === 0) return [{ code: 'empty', message: 'The mesh has no triangles.', count: 0 }];
  return [...edgeProblems(facts), ...vertexProblems(facts), ...bodyProblems(facts), ...normalProblems(facts)];
}

function edgeProblems(facts: MeshFacts): Problem[] {
  const { openEdges, overusedEdges, flippedEdges, tJunctions, degenerateTriangles, duplicateTriangles } = facts;
  return [
    ...tell('openEdges', openEdges, (n) =>
      [
        `${count(n, 'edge belongs', 'edges belong')} to one triangle only, so the surface has a hole or a gap`,
        `(first ${edge(openEdges)}).`,
      ].join(' '),
    ),
    ...tell('overusedEdges', overusedEdges, (n) =>
      [
        `${count(n, 'edge is', 'edges are')} shared by more than two triangles (first ${edge(overusedEdges)},`,
        `${overusedEdges.first[0]!.triangles.length} triangles):`,
        'solids meet along an edge, or a wall has no thickness.',
      ].join(' '),
    ),
    ...tell('flippedEdges', flippedEdges, (n) =>
      [
        `${count(n, 'edge lies', 'edges lie')} between triangles that are turned opposite ways`,
        `(first ${edge(flippedEdges)}): inside and outside are mixed up there.`,
      ].join(' '),
    ),
    ...tell('tJunctions', tJunctions, (n) =>
      [
        `${count(n, 'corner lies', 'corners lie')} on the side of another triangle instead of at its corner`,
        `(first ${at(tJunctions)}, on the ${edge(tJunctions, 1)}).`,
      ].join(' '),
    ),
    ...tell('degenerateTriangles', degenerateTriangles, (n) =>
      [
        `${count(n, 'triangle has', 'triangles have')} no area`,
        `(first with corners ${degenerateTriangles.first[0]!.points.map(spell).join(', ')}).`,
      ].join(' '),
    ),
    ...tell('duplicateTriangles', duplicateTriangles, (n) =>
      [
        `${count(n, 'triangle lies', 'triangles lie')} on the same corners as another one`,
        `(first with corners ${duplicateTriangles.first[0]!.points.map(spell).join(', ')}).`,
      ].join(' '),
    ),
  ];
}

function vertexProblems(facts: MeshFacts): Problem[] {
  const { coincidentVertices, negativeZeros, pinchedVertices, selfTouching, selfTouchingCounted } = facts;
  const separate = coincidentVertices.count - negativeZeros;
  const zeros = { count: negativeZeros, first: coincidentVertices.first };
  return [
    ...tell('negativeZeros', zeros, (n) =>
      [
        `${count(n, 'corner is', 'corners are')} written with 0 in one triangle and with -0 in another;`,
        'programs that compare bits see a gap there.',
      ].join(' '),
    ),
    ...tell('coincidentVertices', { count: separate, first: coincidentVertices.first }, (n) =>
      [
        `${count(n, 'vertex lies', 'vertices lie')} at the place of another one (first ${at(coincidentVertices)}):`,
        facts.watertight ? 'solids touch there.' : 'the triangles there are not joined.',
      ].join(' '),
    ),
    ...tell('pinchedVertices', pinchedVertices, (n) =>
      [
        `At ${count(n, 'vertex', 'vertices')}, parts of the surface meet in nothing but that point`,
        `(first ${at(pinchedVertices)}): the print will break there.`,
      ].join(' '),
    ),
    ...tell('selfTouching', selfTouching, (n) =>
      [
        (selfTouchingCounted ? '' : 'At least ') + count(n, 'pair of triangles crosses', 'pairs of triangles cross'),
        'or touch where there is no common corner or edge',
        `(first near ${spell(selfTouching.first[0]!.points[0]!)}).`,
      ].join(' '),
    ),
  ];
}

function bodyProblems({ bodies }: MeshFacts): Problem[] {
  const tellBodies = (code: 'insideOut' | 'nested', words: (n: number, extents: string) => string): Problem[] => {
    const found = bodies.filter((body) => body.kind === code);
    if (found.length === 0) return [];
    return [{ code, message: words(found.length, spellExtents(found[0]!)), count: found.length }];
  };
  return [
    ...tellBodies('insideOut', (n, where) =>
      [
        `${count(n, 'body is', 'bodies are')} turned inside out (first ${where}):`,
        'every triangle there must be turned round.',
      ].join(' '),
    ),
    ...tellBodies('nested', (n, where) =>
      [
        `${count(n, 'body lies', 'bodies lie')} inside material that is there already, or inside a cavity's wall`,
        `(first ${where}).`,
      ].join(' '),
    ),
  ];
}

function normalProblems({ wrongNormals, missingNormals }: MeshFacts): Problem[] {
  return tell('wrongNormals', { count: wrongNormals, first: [] }, (n) =>
    [
      `${count(n, 'stored normal does', 'stored normals do')} not agree with the order of the corners`,
      `(${missingNormals} of ${n} zero or not a number).`,
    ].join(' '),
  );
}

function tell(code: ProblemCode, finding: Finding, words: (count: number) => string): Problem[] {
  return finding.count === 0 ? [] : [{ code, message: words(finding.count), count: finding.count }];
}

const count = (n: number, one: string, many: string): string => `${n} ${n === 1 ? one : many}`;

/** A point in millimetres to a tenth of a micrometre. */
const spell = (point: Point): string => `(${point.map((value) => Number(value.toFixed(4)) + 0).join(', ')})`;

const at = (finding: Finding): string => `at ${spell(finding.first[0]!.points[0]!)}`;

const edge = (finding: Finding, from = 0): string => {
  const { points } = finding.first[0]!;
  return `edge from ${spell(points[from]!)} to ${spell(points[from + 1]!)}`;
};

const spellExtents = ({ extents }: Body): string => `between ${spell(extents.min)} and ${spell(extents.max)}`;

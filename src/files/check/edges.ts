import type { Mesh } from '../../print/mesh.ts';
import { Clusters } from '../mesh/clusters.ts';
import { endCorner, endOf, startOf, triangleOf, visitEdges } from '../mesh/half-edges.ts';
import { partnersAround } from './edge-partners.ts';
import { Findings, pointOf } from './findings.ts';
import type { Place } from './report.ts';

/** Around one edge, more triangles than this are not sorted by angle but taken as one body. */
const MOST_PARTNERS = 64;

/** How the triangles hang together. */
export interface EdgeFacts {
  readonly open: Findings;
  readonly overused: Findings;
  readonly flipped: Findings;
  readonly pinched: Findings;
  /** The half-edges that have no partner. */
  readonly openHalfEdges: readonly number[];
  /** Triangles that are connected by edges; of a balanced overused edge only partners are. */
  readonly bodies: Clusters;
  /** 1 for triangles at an edge that is open, flipped or not used equally in both directions. */
  readonly unpaired: Uint8Array;
}

/** @param collapsed 1 for triangles with a repeated vertex, which take no part. */
export function examineEdges(mesh: Mesh, collapsed: Uint8Array): EdgeFacts {
  const [open, overused, flipped] = [new Findings(), new Findings(), new Findings()];
  const openHalfEdges: number[] = [];
  const bodies = new Clusters(collapsed.length);
  const unpaired = new Uint8Array(collapsed.length);
  const fans = new Clusters(mesh.triangles.length);
  visitEdges(mesh, collapsed, (uses) => {
    const [first, second] = uses;
    const place = (): Place => placeOfEdge(mesh, uses);
    if (second === undefined) {
      open.add(place);
      openHalfEdges.push(first!);
    } else if (uses.length > 2) overused.add(place);
    else if (startOf(mesh, first!) === startOf(mesh, second)) flipped.add(place);

    const balanced = isBalanced(mesh, uses);
    const sorted = balanced && uses.length > 2 && uses.length <= MOST_PARTNERS;
    if (sorted) for (const [a, b] of partnersAround(mesh, uses)) bodies.join(triangleOf(a), triangleOf(b));
    for (const h of uses) {
      if (!balanced) unpaired[triangleOf(h)] = 1;
      if (!sorted) bodies.join(triangleOf(first!), triangleOf(h));
      joinFans(mesh, fans, first!, h);
    }
  });
  return { open, overused, flipped, pinched: findPinched(mesh, collapsed, fans), openHalfEdges, bodies, unpaired };
}

function placeOfEdge(mesh: Mesh, uses: Uint32Array): Place {
  const ends = [startOf(mesh, uses[0]!), endOf(mesh, uses[0]!)].sort((a, b) => a - b);
  return { points: ends.map((end) => pointOf(mesh, end)), triangles: Array.from(uses, triangleOf) };
}

/** As many uses in one direction as in the other. */
function isBalanced(mesh: Mesh, uses: Uint32Array): boolean {
  let balance = 0;
  for (const h of uses) balance += startOf(mesh, h) < endOf(mesh, h) ? 1 : -1;
  return balance === 0;
}

/** Puts the corners of two triangles at either end of their common edge into one fan each. */
function joinFans(mesh: Mesh, fans: Clusters, a: number, b: number): void {
  const alike = startOf(mesh, a) === startOf(mesh, b);
  fans.join(a, alike ? b : endCorner(b));
  fans.join(endCorner(a), alike ? endCorner(b) : b);
}

/** Vertices with corners of more than one fan. */
function findPinched(mesh: Mesh, collapsed: Uint8Array, fans: Clusters): Findings {
  const pinched = new Findings();
  const fanOf = new Int32Array(mesh.positions.length / 3).fill(-1);
  const told = new Uint8Array(fanOf.length);
  for (let corner = 0; corner < mesh.triangles.length; corner++) {
    if (collapsed[triangleOf(corner)] === 1) continue;
    const vertex = startOf(mesh, corner);
    const fan = fans.root(corner);
    if (fanOf[vertex] === -1) fanOf[vertex] = fan;
    if (fanOf[vertex] === fan || told[vertex] === 1) continue;
    told[vertex] = 1;
    const other = triangleOf(fanOf[vertex]!);
    pinched.add(() => ({ points: [pointOf(mesh, vertex)], triangles: [other, triangleOf(corner)] }));
  }
  return pinched;
}

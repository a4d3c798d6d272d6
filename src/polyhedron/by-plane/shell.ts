import { CORNER, meet } from '../exact/meet.ts';
import type { PlaneTable } from '../exact/plane-table.ts';
import { doubles, integers, withRoom } from '../exact/room.ts';
import { exactMeet, exactSide, ULP } from '../exact/side.ts';

/**
 * The surface of a convex solid as half-edges. Each runs counter-clockwise round its face, seen from outside, and has a
 * twin that runs back along the same edge on the neighbouring face. Vertices may have any number of edges. They are
 * exact: three planes that meet in one point; coordinates only serve as a filter in front of exact signs.
 */
export class Shell {
  next = integers(256);
  previous = integers(256);
  twin = integers(256);
  /** The plane of each half-edge. */
  face = integers(256);
  /** The vertex at its end. */
  end = integers(256);
  /** One half-edge of each plane's face; −1 where the plane has none. */
  edgeOf = integers(64);
  /** One half-edge that ends at each vertex; −1 for vertices that have been cut off. */
  into = integers(64);
  /** x, y, z of each vertex, and what h·x may err by for each unit of |h1| + |h2| + |h3|. */
  place = doubles(64 * CORNER);
  /** Vertices that are left. */
  alive = 0;
  /** How many half-edges and vertices there have been. */
  edges = 0;
  vertices = 0;
  /** The three planes of each vertex. */
  private meeting = integers(3 * 64);

  constructor(readonly planes: PlaneTable) {}

  /** Begins with the frame of the table. */
  begin(): void {
    const { planes } = this;
    const frame = planes.count;
    this.edgeOf = withRoom(this.edgeOf, frame + 6, integers).fill(-1, 0, frame);
    this.edges = 24;
    this.vertices = 0;
    this.alive = 0;
    for (let f = 0; f < 6; f++) {
      const ring = aroundSide(f);
      this.edgeOf[frame + f] = 4 * f;
      ring.forEach((neighbour, i) => {
        const edge = 4 * f + i;
        this.face[edge] = frame + f;
        this.next[edge] = 4 * f + ((i + 1) % 4);
        this.previous[edge] = 4 * f + ((i + 3) % 4);
        this.twin[edge] = 4 * neighbour + aroundSide(neighbour).indexOf(f);
        this.end[edge] = cornerOfCube(f, neighbour, ring[(i + 1) % 4]!);
      });
    }
    for (let v = 0; v < 8; v++) {
      const [x, y, z] = [v & 1 ? 0 : 3, v & 2 ? 1 : 4, v & 4 ? 2 : 5];
      this.addVertex(frame + x, frame + y, frame + z, this.end.indexOf(v));
    }
  }

  /** The vertex where three planes meet, on a half-edge that is to end there. There must be room. */
  addVertex(a: number, b: number, c: number, edge: number): number {
    const v = this.vertices;
    const { place, meeting } = this;
    const at = CORNER * v;
    meet(this.planes.rows, a, b, c, place, at);
    const far = Math.max(Math.abs(place[at]!), Math.abs(place[at + 1]!), Math.abs(place[at + 2]!));
    place[at + 3] = place[at + 3]! + 8 * ULP * far;
    meeting[3 * v] = a;
    meeting[3 * v + 1] = b;
    meeting[3 * v + 2] = c;
    this.into[v] = edge;
    this.vertices += 1;
    this.alive += 1;
    return v;
  }

  /** A new pair of half-edges; answers the first, its twin follows it. There must be room. */
  addEdge(face: number, end: number, twinFace: number, twinEnd: number): number {
    const edge = this.edges;
    this.face[edge] = face;
    this.end[edge] = end;
    this.twin[edge] = edge + 1;
    this.face[edge + 1] = twinFace;
    this.end[edge + 1] = twinEnd;
    this.twin[edge + 1] = edge;
    this.edges += 2;
    return edge;
  }

  /** Lets one half-edge follow another. */
  link(before: number, after: number): void {
    this.next[before] = after;
    this.previous[after] = before;
  }

  /** Exact side of plane p on which a vertex lies. */
  exactSide(v: number, p: number): -1 | 0 | 1 {
    const { meeting } = this;
    return exactSide(this.planes, meeting[3 * v]!, meeting[3 * v + 1]!, meeting[3 * v + 2]!, p);
  }

  /** Exact vertex, rounded to doubles. */
  exactPlace(v: number): readonly [number, number, number] {
    const { meeting } = this;
    return exactMeet(this.planes, meeting[3 * v]!, meeting[3 * v + 1]!, meeting[3 * v + 2]!);
  }

  /** Makes room for so many new vertices and edges. */
  makeRoom(count: number): void {
    const edges = this.edges + 2 * count;
    if (edges > this.next.length) {
      this.next = withRoom(this.next, edges, integers);
      this.previous = withRoom(this.previous, edges, integers);
      this.twin = withRoom(this.twin, edges, integers);
      this.face = withRoom(this.face, edges, integers);
      this.end = withRoom(this.end, edges, integers);
    }
    const vertices = this.vertices + count;
    if (vertices > this.into.length) {
      this.into = withRoom(this.into, vertices, integers);
      this.place = withRoom(this.place, CORNER * vertices, doubles);
      this.meeting = withRoom(this.meeting, 3 * vertices, integers);
    }
  }
}

/** Sides 0 to 5 of a cube look along x, y, z, −x, −y, −z. The four around one, counter-clockwise from outside. */
function aroundSide(side: number): number[] {
  const [i, j] = [(side + 1) % 3, (side + 2) % 3];
  return side < 3 ? [i, j, i + 3, j + 3] : [i, j + 3, i + 3, j];
}

/** Corners of the cube are numbered by their positive coordinates: x counts 1, y 2, z 4. */
const cornerOfCube = (...sides: readonly number[]): number =>
  sides.reduce((sum, side) => sum + (side < 3 ? 1 << side : 0), 0);

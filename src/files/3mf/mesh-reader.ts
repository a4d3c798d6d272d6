import type { Mesh } from '../../print/mesh.ts';
import { indexIn, numberIn } from './number-text.ts';
import { fault } from './resources.ts';
import type { Attributes } from './xml-scan.ts';

/** Collects a mesh from its elements. */
export class MeshReader {
  private readonly positions: number[] = [];
  private readonly triangles: number[] = [];
  private painted = false;

  /** @param properties how many properties each group has, by its id */
  constructor(
    private readonly object: string,
    private readonly properties: ReadonlyMap<number, number>,
  ) {}

  vertex(attributes: Attributes): void {
    for (const axis of ['x', 'y', 'z']) {
      const value = numberIn(attributes.get(axis));
      if (Number.isNaN(value)) {
        const where = `In ${this.object}, ${axis} of vertex ${Math.floor(this.positions.length / 3)}`;
        throw fault('notFinite', `${where} is no number: "${attributes.get(axis) ?? ''}".`);
      }
      this.positions.push(value);
    }
  }

  triangle(attributes: Attributes): void {
    for (const corner of ['v1', 'v2', 'v3']) {
      const vertex = indexIn(attributes.get(corner));
      if (!(vertex < this.positions.length / 3)) {
        const where = `In ${this.object}, triangle ${Math.floor(this.triangles.length / 3)}`;
        const [named, last] = [attributes.get(corner) ?? '', this.positions.length / 3 - 1];
        throw fault('index', `${where} names vertex "${named}"; vertices are numbered from 0 to ${last}.`);
      }
      this.triangles.push(vertex);
    }
    if (attributes.size > 3) this.paint(attributes);
  }

  private paint(attributes: Attributes): void {
    const group = attributes.get('pid');
    if (group === undefined) return;
    this.painted = true;
    for (const corner of ['p1', 'p2', 'p3']) {
      const property = attributes.get(corner);
      if (property !== undefined) this.demandProperty(group, property, `triangle ${this.triangles.length / 3 - 1}`);
    }
  }

  /** @param defaults the object's own attributes */
  finish(defaults: Attributes): Mesh {
    const [group, property] = [defaults.get('pid'), defaults.get('pindex')];
    if (group !== undefined) this.demandProperty(group, property ?? '', 'the object');
    else if (this.painted)
      throw fault('index', `In ${this.object}, triangles have colours but the object itself has none (pid, pindex).`);
    if (this.triangles.length === 0) throw fault('empty', `The mesh of ${this.object} has no triangles.`);
    return { positions: Float64Array.from(this.positions), triangles: Uint32Array.from(this.triangles) };
  }

  private demandProperty(group: string, property: string, what: string): void {
    const count = this.properties.get(indexIn(group));
    if (count !== undefined && indexIn(property) < count) return;
    const where = `In ${this.object}, ${what} has property "${property}" of group "${group}"`;
    throw fault(
      'index',
      `${where}, ${count === undefined ? 'but no such group is defined before it' : `which has ${count}`}.`,
    );
  }
}

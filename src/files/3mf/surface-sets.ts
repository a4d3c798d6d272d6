import type { Mesh } from '../../print/mesh.ts';
import type { Surface } from '../../print/part.ts';
import { OWN_PREFIX } from './names.ts';
import { escaped, type XmlBytes } from './xml-bytes.ts';

/** Triangle sets (3MF core 1.4.0, section 4.1.5) that name each surface; readers may pass over them. */
export function writeSurfaceSets(xml: XmlBytes, { triangles, surface }: Mesh, surfaces: readonly Surface[]): void {
  xml.text('<t:trianglesets>\n');
  const runs = runsOf(surface ?? new Uint16Array(triangles.length / 3));
  surfaces.forEach(({ name }, number) => {
    const own = runs.get(number);
    if (!own) return;
    xml.text(`<t:triangleset name="${escaped(name)}" identifier="${OWN_PREFIX}:surface-${number + 1}">\n`);
    // The schema wants single triangles before ranges.
    for (const [from, to] of own) if (from === to) xml.ascii('<t:ref index="').whole(from).ascii('"/>\n');
    for (const [from, to] of own)
      if (from !== to) xml.ascii('<t:refrange startindex="').whole(from).ascii('" endindex="').whole(to).ascii('"/>\n');
    xml.text('</t:triangleset>\n');
  });
  xml.text('</t:trianglesets>\n');
}

/** First and last triangle of each run of one surface, by surface. */
function runsOf(surface: Uint16Array): Map<number, [number, number][]> {
  const runs = new Map<number, [number, number][]>();
  let from = 0;
  for (let t = 1; t <= surface.length; t++) {
    if (surface[t] === surface[from]) continue;
    const own = runs.get(surface[from]!) ?? [];
    own.push([from, t - 1]);
    runs.set(surface[from]!, own);
    from = t;
  }
  return runs;
}

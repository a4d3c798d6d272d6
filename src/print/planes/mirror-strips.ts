import type { Manifold } from 'manifold-3d';
import type { Workbench } from '../kit.ts';
import type { Mesh } from '../mesh.ts';
import type { Part } from '../part.ts';

/** Okabe and Ito's vermilion (Color Universal Design, 2008), unmixed: it must stand out from every form's colour. */
const STRIP_COLOUR = '#D55E00';

/**
 * The strips of inlaid mirror planes as a part of their own, to be laid down in one job with the body.
 * @param lie takes a mesh from the crystal's frame to where the body lies on the bed, so that strips and body share one
 * place there
 */
export function mirrorStrips(bench: Workbench, inlay: Manifold, lie: (mesh: Mesh) => Mesh): Part {
  const mesh = bench.mesh(inlay, 0);
  return {
    name: 'mirror-planes',
    purpose: 'the mirror planes, as strips in a second colour that lie in the body, printed with it in one job',
    surfaces: [{ name: 'mirror planes', colour: STRIP_COLOUR }],
    mesh: lie(mesh),
    placed: [mesh],
  };
}

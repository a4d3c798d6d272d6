import { form } from '../crystal/form.ts';
import { printFace, printZone } from '../crystal/indices.ts';
import { type Miller, miller } from '../crystal/spaces.ts';
import { openDirections } from '../polyhedron/open.ts';
import { ObjectError } from './object-error.ts';
import { type ClosedShape, isClosed, type Shape } from './shape.ts';

const CANDIDATES: readonly Miller[] = [
  [0, 0, 1],
  [1, 0, 0],
  [0, 1, 0],
  [1, 1, 0],
  [1, 0, 1],
  [0, 1, 1],
  [1, 1, 1],
].map(([h, k, l]) => miller(h!, k!, l!));

/** The shape, if its faces close. @throws ObjectError `open`, with forms that would close it */
export function closedOrThrow(shape: Shape): ClosedShape {
  if (isClosed(shape)) return shape;
  throw new ObjectError('open', openMessage(shape), closingAdvice(shape));
}

/** Along which directions a crystal is open, in words. */
const openMessage = ({ openAlong }: Shape): string =>
  `these forms do not close: the crystal stays open along ${openAlong.map((ray) => printZone(ray)).join(', ')}`;

/** Names simple forms that would close an open crystal, as lines for its recipe. */
export function closingAdvice({ crystal }: Shape): string {
  const { group, forms } = crystal;
  const faces = forms.flatMap(({ form: { faces } }) => faces);
  const lines = closingForms(faces, group).map(
    (face) => `- { face: "${printFace(face, group.axes)}", distance: ${forms[0]!.distance} }`,
  );
  return `Add forms across that, for instance  ${lines.join('  and  ')}`;
}

/** Forms from the simplest faces and their opposites that close the crystal when added one after the other. */
function closingForms(faces: readonly Miller[], group: Parameters<typeof form>[0]): Miller[] {
  const opposites = CANDIDATES.map(([h, k, l]) => miller(0 - h, 0 - k, 0 - l));
  const candidates = [...CANDIDATES, ...opposites];
  const rays = (all: readonly Miller[]): number => openDirections(all.flat()).length;
  const single = candidates.find((face) => rays([...faces, ...form(group, face).faces]) === 0);
  if (single) return [single];
  const added: Miller[] = [];
  let all = faces;
  for (const face of candidates) {
    const open = openDirections(all.flat());
    if (open.length === 0) break;
    const more = form(group, face).faces;
    if (!open.some((ray) => more.some((h) => h[0] * ray[0] + h[1] * ray[1] + h[2] * ray[2] > 0))) continue;
    added.push(face);
    all = [...all, ...more];
  }
  return added;
}

import { parseFace, readOptions } from '../crystal/indices.ts';
import type { DrawOptions } from '../draw/crystal.ts';
import type { View } from '../draw/view.ts';
import type { Crystal } from '../recipe/crystal.ts';
import { readDirection } from '../recipe/print-plan.ts';
import { oneOf, UsageError } from './failure.ts';

export interface LookFlags {
  readonly view: string;
  readonly lines?: true;
  readonly hidden: string;
  readonly labels: string;
  readonly height?: true;
  readonly bare?: true;
}

/** How a drawing looks, from flags. @throws UsageError */
export function lookFrom(
  flags: LookFlags,
): Pick<DrawOptions, 'style' | 'hidden' | 'labels' | 'height' | 'title' | 'legend' | 'scaleBar'> {
  return {
    style: flags.lines ? 'lines' : 'tinted',
    hidden: oneOf('--hidden', flags.hidden, ['thin', 'none']),
    labels: oneOf('--labels', flags.labels, ['none', 'letters', 'indices']),
    ...(flags.height && { height: true }),
    ...(flags.bare && { title: false, legend: false, scaleBar: false }),
  };
}

/** "general", "c", "[111]", "(10-11)", "30 20". @throws UsageError, CrystalError */
export function viewFrom(text: string, { group }: Crystal): View {
  const view = text.trim();
  if (view === 'general') return 'general';
  if (/^\[.*\]$|^[abc]$/i.test(view)) return { along: readDirection(view, group) };
  if (/^\(.*\)$/.test(view)) return { onto: parseFace(view, readOptions(group.axes)) };
  const [turn, tilt, ...more] = view.split(/[\s,]+/).map(Number);
  if (turn !== undefined && tilt !== undefined && more.length === 0 && Number.isFinite(turn + tilt))
    return { turn, tilt };
  throw new UsageError(
    `--view "${text}" is no direction: give general, an axis such as c or "[111]", a face such as "(111)", or turn and tilt such as "30 20".`,
  );
}

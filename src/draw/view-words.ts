import { printFace, printZone } from '../crystal/indices.ts';
import type { Axes } from '../crystal/setting.ts';
import type { View } from './view.ts';

const OF_THE_CELL: Readonly<Record<string, string>> = { '1,0,0': 'a', '0,1,0': 'b', '0,0,1': 'c' };

/** A view in words, with overbars: "general view", "along c", "along [111]", "onto (10̅1)", "turn 30°, tilt 20°". */
export function viewWords(view: View, axes: Axes): string {
  if (view === 'general') return 'general view';
  if ('along' in view) return `along ${OF_THE_CELL[view.along.join(',')] ?? printZone(view.along, { overbar: true })}`;
  if ('onto' in view) return `onto ${printFace(view.onto, axes, { brackets: '(', overbar: true })}`;
  return `turn ${degrees(view.turn)}, tilt ${degrees(view.tilt)}`;
}

const degrees = (angle: number): string => `${Number(angle.toFixed(1)).toString().replace('-', '−')}°`;

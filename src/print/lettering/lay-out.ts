import { readMarks, type SetCharacter } from './marks.ts';
import { assertGlyphs, type Typeface } from './typeface.ts';

/** Left, bottom, right and top of what is inked. */
export interface InkBox {
  readonly left: number;
  readonly bottom: number;
  readonly right: number;
  readonly top: number;
}

/** A glyph at its place; type sizes, y upwards. */
export interface PlacedGlyph {
  readonly character: string;
  readonly x: number;
  readonly y: number;
  /** Its own size beside the text's. */
  readonly scale: number;
}

/** Text with every glyph and bar at its place, in type sizes (em) from the left end of the first baseline. */
export interface TextLayout {
  readonly text: string;
  readonly glyphs: readonly PlacedGlyph[];
  readonly bars: readonly InkBox[];
  readonly box: InkBox;
  /** Thinnest stroke in it. */
  readonly stroke: number;
}

/** Figures in formulas and charges: size and baseline. Common typesetting practice. */
const LEVEL = { line: { scale: 1, y: 0 }, below: { scale: 0.65, y: -0.14 }, above: { scale: 0.65, y: 0.32 } };
const SMALLEST_BAR = 0.34;
const BAR_GAP = 0.1;

/**
 * Lays out one line.
 * @param gap least space between the inks of neighbours, in type sizes, so that none run together in print
 * @throws ObjectError `text` for characters that the typeface lacks
 */
export function layOutText(typeface: Typeface, text: string, gap: number): TextLayout {
  const characters = readMarks(text);
  assertGlyphs(
    typeface,
    characters.map(({ character }) => character),
    text,
  );
  const glyphs: PlacedGlyph[] = [];
  const bars: InkBox[] = [];
  const inks: InkBox[] = [];
  let [pen, free] = [0, Number.NEGATIVE_INFINITY];
  for (const one of characters) {
    const { ink, advance, bar } = metricsOf(typeface, one);
    const { scale, y } = LEVEL[one.level];
    if (ink) {
      pen = Math.max(pen, free + gap - Math.min(ink.left, bar?.left ?? ink.left));
      const at = moved(ink, pen, 0);
      glyphs.push({ character: one.character, x: pen, y, scale });
      inks.push(at);
      free = at.right;
      if (bar) {
        const placed = moved(bar, pen, 0);
        const before = one.joined ? bars.pop() : undefined;
        bars.push({ ...placed, left: before?.left ?? placed.left });
        free = Math.max(free, placed.right);
      }
    }
    pen += advance;
  }
  const stroke = typeface.stroke * Math.min(1, ...glyphs.map(({ scale }) => scale));
  return { text, glyphs, bars, box: around([...inks, ...bars]), stroke };
}

function metricsOf(
  { font, capital, stroke }: Typeface,
  { character, level, bar }: SetCharacter,
): { ink: InkBox | null; advance: number; bar: InkBox | null } {
  const glyph = font.charToGlyph(character);
  const { scale, y } = LEVEL[level];
  const unit = scale / font.unitsPerEm;
  const advance = (glyph.advanceWidth ?? 0) * unit;
  if (glyph.path.commands.length === 0) return { ink: null, advance, bar: null };
  const { x1, y1, x2, y2 } = glyph.getBoundingBox();
  const ink = { left: x1 * unit, bottom: y1 * unit + y, right: x2 * unit, top: y2 * unit + y };
  if (!bar) return { ink, advance, bar: null };
  const half = Math.max(ink.right - ink.left, SMALLEST_BAR * scale) / 2;
  const middle = (ink.left + ink.right) / 2;
  const bottom = Math.max(ink.top, capital * scale + y) + Math.max(BAR_GAP, stroke);
  return { ink, advance, bar: { left: middle - half, right: middle + half, bottom, top: bottom + stroke } };
}

/** Lines one below the other as one layout. @param pitch from baseline to baseline, in type sizes */
export function stackLines(lines: readonly TextLayout[], pitch: number, align: 'left' | 'middle'): TextLayout {
  const shifted = lines.map((line, i) => {
    const { left, right } = line.box;
    return shift(line, align === 'left' ? -left : -(left + right) / 2, -i * pitch);
  });
  return {
    text: lines.map(({ text }) => text).join(' / '),
    glyphs: shifted.flatMap(({ glyphs }) => glyphs),
    bars: shifted.flatMap(({ bars }) => bars),
    box: around(shifted.map(({ box }) => box)),
    stroke: Math.min(...lines.map(({ stroke }) => stroke)),
  };
}

function shift(layout: TextLayout, dx: number, dy: number): TextLayout {
  return {
    ...layout,
    glyphs: layout.glyphs.map((glyph) => ({ ...glyph, x: glyph.x + dx, y: glyph.y + dy })),
    bars: layout.bars.map((bar) => moved(bar, dx, dy)),
    box: moved(layout.box, dx, dy),
  };
}

const moved = ({ left, bottom, right, top }: InkBox, dx: number, dy: number): InkBox => ({
  left: left + dx,
  bottom: bottom + dy,
  right: right + dx,
  top: top + dy,
});

const around = (boxes: readonly InkBox[]): InkBox => ({
  left: Math.min(...boxes.map(({ left }) => left)),
  bottom: Math.min(...boxes.map(({ bottom }) => bottom)),
  right: Math.max(...boxes.map(({ right }) => right)),
  top: Math.max(...boxes.map(({ top }) => top)),
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { miller, zone } from '../../src/crystal/spaces.ts';
import { type DrawOptions, drawCrystal } from '../../src/draw/crystal.ts';
import { textWidth } from '../../src/draw/text-width.ts';
import { viewFrame } from '../../src/draw/view.ts';
import { viewWords } from '../../src/draw/view-words.ts';
import { look } from '../../src/draw/visible.ts';
import type { ClosedShape } from '../../src/shape/shape.ts';
import {
  anyCrystal,
  anyView,
  CRYSTALS,
  cube,
  hexaoctahedron,
  monoclinic,
  octahedron,
  quartz,
  rodsOf,
  scalenohedron,
  shapeOf,
  tetrahedron,
} from './crystals.ts';
import { pathPoints, readXml, type XmlElement } from './xml.ts';

const BARE: DrawOptions = { title: false, legend: false, scaleBar: false };

function everything(shape: ClosedShape): DrawOptions {
  const millimetresPerUnit = 70 / shape.measures.circumscribedRadius / 2;
  const axes = rodsOf(shape, millimetresPerUnit, { reach: 12, diameter: 3 });
  return { axes, labels: 'letters', millimetresPerUnit, height: true };
}

const paths = (svg: string): XmlElement[] => readXml(svg).filter(({ name }) => name === 'path');

/** How many edges a drawing without rods shows: strong ones, thin ones, and those around the outline. */
function edgesOf(svg: string) {
  const strokes = paths(svg).filter(({ attributes }) => attributes.fill === 'none');
  const lines = (path: XmlElement | undefined): number => (path ? pathPoints(path.attributes.d!).length / 2 : 0);
  const outline = strokes.find(({ attributes }) => attributes.d!.endsWith('Z'))!;
  return {
    thin: lines(strokes.find(({ attributes }) => attributes['stroke-dasharray'])),
    inner: lines(strokes.find(({ attributes: { d, 'stroke-dasharray': dash } }) => !dash && !d!.endsWith('Z'))),
    outline: pathPoints(outline.attributes.d!).length,
    faces: paths(svg).filter(({ attributes }) => attributes.fill !== 'none').length,
  };
}

describe('edges and faces of a drawing', () => {
  it.each([
    ['cube along [111]', cube, [1, 1, 1], { faces: 3, outline: 6, inner: 3, thin: 3 }],
    ['cube along [001]', cube, [0, 0, 1], { faces: 1, outline: 4, inner: 0, thin: 4 }],
    ['octahedron along [001]', octahedron, [0, 0, 1], { faces: 4, outline: 4, inner: 4, thin: 4 }],
  ] as const)('%s', (_, shape, [u, v, w], expected) => {
    expect(edgesOf(drawCrystal(shape, { ...BARE, view: { along: zone(u, v, w) } }))).toEqual(expected);
  });

  it.each(CRYSTALS)('of the %s in the general view: strong and thin edges are all edges', (_, shape) => {
    const { thin, inner, outline } = edgesOf(drawCrystal(shape, BARE));
    expect(thin + inner + outline).toBe(shape.solid.neighbour.length / 2);
  });

  it('leaves hidden edges out when asked', () => {
    expect(edgesOf(drawCrystal(cube, { ...BARE, hidden: 'none' }))).toEqual({
      faces: 3,
      outline: 6,
      inner: 3,
      thin: 0,
    });
  });

  it('has a colour for each form, or none', () => {
    const fills = (style: 'tinted' | 'lines') =>
      new Set(paths(drawCrystal(cube, { ...BARE, style })).flatMap(({ attributes: { fill } }) => fill ?? []));
    expect(fills('tinted').size).toBe(4); // three shades of one tint, and lines without filling
    expect(fills('lines').size).toBe(2);
  });
});

describe('the file', () => {
  it.each(CRYSTALS)('of the %s with everything on it is well-formed, and the same every time', (_, shape) => {
    const svg = drawCrystal(shape, everything(shape));
    const [root] = readXml(svg);
    expect(root!.attributes.xmlns).toBe('http://www.w3.org/2000/svg');
    expect(drawCrystal(shape, everything(shape))).toBe(svg);
    expect(svg).not.toMatch(/NaN|Infinity|undefined|null|-0[^.\d]|\d\.\d{3}|\de[+-]\d/);
  });

  it('keeps everything inside the page, from everywhere', () => {
    fc.assert(
      fc.property(anyCrystal, anyView, fc.boolean(), (shape, view, full) => {
        const elements = readXml(drawCrystal(shape, { ...(full ? everything(shape) : BARE), view }));
        const [, , width, height] = elements[0]!.attributes.viewBox!.split(' ').map(Number);
        const points = elements.flatMap(({ attributes: { d, x, y } }): [number, number][] =>
          d ? pathPoints(d) : x && y ? [[Number(x), Number(y)]] : [],
        );
        expect(points.length).toBeGreaterThan(3);
        for (const [x, y] of points) {
          expect(x >= 0 && x <= width! && y >= 0 && y <= height!, `${x}, ${y} on ${width} × ${height}`).toBe(true);
        }
      }),
      { numRuns: 80 },
    );
  });

  it('takes any title', () => {
    const svg = drawCrystal(scalenohedron);
    const elements = readXml(svg);
    expect(elements[1]).toMatchObject({ name: 'title', text: 'Calcite <dogtooth> & "spar", point group -3m' });
    expect(elements.some(({ name, text }) => name === 'text' && text === 'Calcite <dogtooth> & "spar"')).toBe(true);
  });

  it('can be transparent', () => {
    const grounds = (ground: 'paper' | 'none') =>
      readXml(drawCrystal(cube, { ...BARE, ground })).filter(({ name }) => name === 'rect').length;
    expect([grounds('paper'), grounds('none')]).toEqual([1, 0]);
  });
});

const words = (svg: string): string[] =>
  readXml(svg).flatMap(({ name, text }) => (name === 'text' && text !== '' ? [text] : []));

/** How far each run of words reaches on the page, from the type's own widths. */
const reaches = (svg: string) =>
  readXml(svg).flatMap(({ name, text, attributes: { x, y, 'font-size': size, 'text-anchor': anchor } }) => {
    if (name !== 'text' || text === '') return [];
    const width = textWidth(text) * Number(size);
    const left = Number(x) - width * (anchor === 'middle' ? 0.5 : anchor === 'end' ? 1 : 0);
    return [{ text, left, right: left + width, y: Number(y), size: Number(size) }];
  });

describe('a title', () => {
  const draw = (title: string, width = 640) =>
    drawCrystal({ ...quartz, crystal: { ...quartz.crystal, title } }, { width });
  const ofTitle = (svg: string) =>
    reaches(svg).slice(
      0,
      reaches(svg).findIndex(({ size }) => size === 17),
    );

  it('of up to 120 characters never leaves the page', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string({ minLength: 1, maxLength: 120 }),
          fc.string({ unit: fc.constantFrom('W', 'm', ' ', 'a', '-', '{10-11}'), minLength: 90, maxLength: 120 }),
          fc.constantFrom('W'.repeat(120), 'Quartz from the lower vein '.repeat(4), 'i'.repeat(120)),
        ),
        fc.constantFrom(200, 320, 640, 1600),
        (title, width) => {
          for (const { right, text } of reaches(draw(title, width)))
            expect(right, text).toBeLessThanOrEqual(width - 20);
        },
      ),
      { numRuns: 120 },
    );
  });

  it('shrinks a little, then takes two lines, and is told in full', () => {
    const title =
      'Quartz from the lower vein of the old pit behind the town, found by the miners in the spring of that year, no. 7';
    const [first, second, ...more] = ofTitle(draw(title));
    expect(more).toEqual([]);
    expect(`${first!.text} ${second!.text}`).toBe(title);
    expect(second!.y - first!.y).toBeGreaterThan(first!.size);
    const [one, ...none] = ofTitle(draw('Quartz from the lower vein of the old pit'));
    expect([none, one!.size < 27, one!.size >= 20]).toEqual([[], true, true]);
  });

  it("puts the remark of a mineral's name into the line below", () => {
    const text = words(drawCrystal(shapeOf({ mineral: 'kdp' })));
    expect(text.slice(0, 1)).toEqual(['Potassium dihydrogen phosphate']);
    expect(text).toContain('laboratory crystal');
  });

  it('of a set has drawn overbars', () => {
    const svg = draw('Rhombohedron {10-11} of -3');
    const [bars] = paths(svg).map(({ attributes }) => pathPoints(attributes.d!));
    expect(bars).toHaveLength(2);
    expect(svg).not.toMatch(/>[^<]*-\d[^<]*<\/(text|tspan)/);
  });
});

describe('the view', () => {
  it.each([
    ['general', 'general view'],
    [{ along: zone(0, 0, 1) }, 'along c'],
    [{ along: zone(1, 1, 1) }, 'along [111]'],
    [{ turn: 30, tilt: -20 }, 'turn 30°, tilt −20°'],
  ] as const)('%o is named', (view, name) => {
    expect(words(drawCrystal(cube, { view }))).toContain(name);
    expect(words(drawCrystal(cube, { ...BARE, view }))).toEqual([]);
  });

  it('onto a face is named with overbars', () => {
    const view = { onto: miller(1, 0, -1) };
    expect(viewWords(view, 'hexagonal')).toBe('onto (101\u03051\u0305)');
    const svg = drawCrystal(quartz, { view });
    expect(words(svg)).toContain('onto');
    expect(svg).not.toMatch(/[\u0300-\u036f]/);
  });
});

describe('labels and hidden edges', () => {
  it('stay apart: no dash runs through a letter', () => {
    fc.assert(
      fc.property(anyView, (view) => {
        const svg = drawCrystal(quartz, { ...BARE, labels: 'letters', view });
        const dashes = paths(svg).filter(({ attributes }) => attributes['stroke-dasharray']);
        const points = pathPoints(dashes[0]?.attributes.d ?? '');
        const level = readXml(svg.replace(/<g transform.*?<\/g>/g, ''));
        for (const { text, attributes: a } of level.filter(({ name }) => name === 'text')) {
          const [x, y, size] = [Number(a.x), Number(a.y), Number(a['font-size'])];
          const half = (textWidth(text) * size) / 2;
          for (let i = 0; i + 1 < points.length; i += 2)
            for (let t = 0; t <= 1; t += 0.005) {
              const [px, py] = [0, 1].map((k) => points[i]![k]! * (1 - t) + points[i + 1]![k]! * t) as [number, number];
              expect(Math.abs(px - x) < half && py < y && py > y - 0.55 * size, `${text} at ${x}, ${y}`).toBe(false);
            }
        }
      }),
      { numRuns: 40 },
    );
  });

  it.each(['letters', 'indices'] as const)(
    'every face of the prism and its rhombohedra that is seen has its %s',
    (labels) => {
      const label = (svg: string) =>
        readXml(svg).filter(({ name, attributes }) => name === 'text' && Number(attributes['font-size']) < 30).length;
      const seen = look(quartz, viewFrame('general', quartz.crystal.metric).toward).front.length;
      const small = 1; // a sliver of r, 8 pixels wide, at the lower right
      expect(label(drawCrystal(quartz, { ...BARE, labels }))).toBeGreaterThanOrEqual(seen - small);
    },
  );
});

describe('words around the picture', () => {
  it('name mineral, shape and formula, and every form that shows', () => {
    const text = words(drawCrystal(quartz, { labels: 'letters' })).join('|');
    expect(text).toContain('SiO₂');
    for (const name of ['hexagonal prism', 'rhombohedron']) expect(text).toContain(name);
  });

  it('can be left out', () => {
    expect(words(drawCrystal(quartz, BARE))).toEqual([]);
  });

  it('say which faces are helpers', () => {
    const names = (helpers: number[]) =>
      words(drawCrystal(quartz, { helpers })).filter((text) => /prism|rhomb/.test(text));
    expect(names([])).toEqual(['hexagonal prism', 'rhombohedron', 'rhombohedron']);
    expect(names([1, 2])).toEqual(['hexagonal prism', 'rhombohedron, helper faces', 'rhombohedron, helper faces']);
  });

  it('do not name forms that do not show', () => {
    const forms = [
      { face: 'm', distance: 100 },
      { face: 'r', distance: 1 },
      { face: 'z', distance: 1.1 },
    ];
    const text = words(drawCrystal(shapeOf({ mineral: 'quartz', forms }))).join('|');
    expect(text).toContain('rhombohedron');
    expect(text).not.toContain('hexagonal prism');
  });
});

describe('sizes', () => {
  it('state the true height along c, on a line foreshortened by the cosine of the tilt', () => {
    const tilt = 25;
    const svg = drawCrystal(cube, {
      ...BARE,
      scaleBar: true,
      height: true,
      millimetresPerUnit: 30,
      view: { turn: 10, tilt },
    });
    expect(words(svg)).toContain('60.0 mm');
    const lines = paths(svg).filter(({ attributes }) => attributes.stroke === '#6b6a66');
    const pointsOf = (width: string) =>
      lines
        .filter(({ attributes }) => attributes['stroke-width'] === width)
        .map(({ attributes }) => pathPoints(attributes.d!));
    const [[height], [bar], extensions] = [pointsOf('1'), pointsOf('1.2'), pointsOf('0.7')];
    const drawn = height![1]![1] - height![0]![1];
    const length = Number(/(\d+) mm\|?$/.exec(words(svg).join('|'))![1]);
    const pixelsPerMillimetre = (bar![1]![0] - bar![0]![0]) / length;
    expect(drawn / pixelsPerMillimetre / Math.cos((tilt * Math.PI) / 180)).toBeCloseTo(60, 1);
    // Thin lines lead from the ends to the middles of the cube's top and base, which lie straight above each other.
    expect(extensions.map((line) => line[0]![1]).sort((a, b) => a - b)).toEqual([height![0]![1], height![1]![1]]);
    expect(extensions[0]![1]![0]).toBeCloseTo(extensions[1]![1]![0], 2);
    expect(words(svg)).toContain('true height');
  });

  it('need no such remark where heights are drawn at full length', () => {
    const level = { view: { turn: 10, tilt: 0 }, height: true, millimetresPerUnit: 30 };
    expect(words(drawCrystal(cube, { ...BARE, ...level }))).toEqual(['60.0 mm']);
  });

  it('have no height line along c itself', () => {
    const along = { view: { along: zone(0, 0, 1) }, height: true, millimetresPerUnit: 30 } as const;
    expect(words(drawCrystal(cube, { ...BARE, ...along }))).toEqual([]);
  });

  it('draw rods of the size that was asked for: the picture grows by reach on both sides', () => {
    const view = { onto: miller(1, 0, 0) };
    const span = (svg: string) => {
      const points = paths(svg).flatMap(({ attributes }) => pathPoints(attributes.d!));
      const body = paths(svg).find(({ attributes }) => attributes.d!.endsWith('Z') && attributes.fill === 'none')!;
      const xs = (all: [number, number][]) => Math.max(...all.map(([x]) => x)) - Math.min(...all.map(([x]) => x));
      return xs(points) / xs(pathPoints(body.attributes.d!));
    };
    const axes = rodsOf(cube, 20, { reach: 12, diameter: 3, orders: [4] });
    const svg = drawCrystal(cube, { ...BARE, view, axes, millimetresPerUnit: 20 });
    expect(span(svg)).toBeCloseTo((40 + 24) / 40, 3);
  });
});

describe('refusals', () => {
  it.each([
    [{ height: true }, 'only for an object with a size'],
    [{ millimetresPerUnit: 0 }, 'must be a positive number'],
    [{ millimetresPerUnit: Number.NaN }, 'must be a positive number'],
    [{ width: 20 }, 'choose 200 to 20000'],
    [{ view: { turn: Number.NaN, tilt: 0 } }, 'turn and a tilt'],
  ] as const)('%o', (options, message) => {
    expect(() => drawCrystal(monoclinic, options)).toThrow(message);
  });
});

describe('crystals with many faces or none behind', () => {
  it('draw all 24 front faces of a hexaoctahedron and one of a tetrahedron seen along its three-fold axis', () => {
    expect(edgesOf(drawCrystal(hexaoctahedron, { ...BARE, view: { turn: 20, tilt: 15 } })).faces).toBe(24);
    expect(edgesOf(drawCrystal(tetrahedron, { ...BARE, view: { along: zone(1, 1, 1) } })).faces).toBe(1);
    expect(edgesOf(drawCrystal(tetrahedron, { ...BARE, view: { along: zone(-1, -1, -1) } })).faces).toBe(3);
  });
});

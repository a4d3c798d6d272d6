import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { miller, zone } from '../../src/crystal/spaces.ts';
import { type DrawOptions, drawCrystal } from '../../src/draw/crystal.ts';
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

describe('words around the picture', () => {
  it('name mineral, shape and formula, and every form that shows', () => {
    const text = words(drawCrystal(quartz, { labels: 'letters' })).join('|');
    expect(text).toContain('SiO₂');
    for (const name of ['hexagonal prism', 'rhombohedron']) expect(text).toContain(name);
  });

  it('can be left out', () => {
    expect(words(drawCrystal(quartz, BARE))).toEqual([]);
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
  it('state the height along c, foreshortened by the cosine of the tilt', () => {
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
    const [height, bar] = lines.map(({ attributes }) => pathPoints(attributes.d!));
    const drawn = height![1]![1] - height![0]![1];
    const length = Number(
      words(svg)
        .find((text) => text !== '60.0 mm')!
        .replace(' mm', ''),
    );
    const pixelsPerMillimetre = (bar![1]![0] - bar![0]![0]) / length;
    expect(drawn / pixelsPerMillimetre / Math.cos((tilt * Math.PI) / 180)).toBeCloseTo(60, 1);
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

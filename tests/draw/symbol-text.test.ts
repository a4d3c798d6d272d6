import { describe, expect, it } from 'vitest';
import { printFace } from '../../src/crystal/indices.ts';
import { miller } from '../../src/crystal/spaces.ts';
import { printSymbol } from '../../src/crystal/symbol.ts';
import { layOutSymbol, symbolText } from '../../src/draw/symbol-text.ts';
import { pathPoints, readXml } from './xml.ts';

const drawn = (text: string) => {
  const elements = readXml(`<svg>${symbolText(layOutSymbol(text), { start: [0, 100], size: 10 })}</svg>`);
  const characters = elements.filter(({ name }) => name === 'tspan');
  const bars = elements.filter(({ name }) => name === 'path').flatMap(({ attributes }) => pathPoints(attributes.d!));
  return {
    text: characters.map(({ text }) => text).join(''),
    at: characters.map(({ attributes }) => Number(attributes.x)),
    italic: characters.filter(({ attributes }) => attributes['font-style']).map(({ text }) => text),
    bars: bars.flatMap(([x], i) => (i % 2 === 0 ? [[x, bars[i + 1]![0]] as [number, number]] : [])),
    heights: new Set(bars.map(([, y]) => y)),
  };
};

describe('symbols with overbars', () => {
  it('have one bar over each negative figure, in its middle and above it', () => {
    const { text, at, bars, heights } = drawn(printFace(miller(-1, 0, 1), 'cubic', { brackets: '{', overbar: true }));
    expect(text).toBe('{101}');
    expect(bars).toHaveLength(1);
    expect((bars[0]![0] + bars[0]![1]) / 2).toBeCloseTo(at[1]!, 1);
    expect(Math.max(...heights)).toBeLessThan(100 - 7.3);
  });

  it('keep the bars of neighbouring indices apart and join that of a number', () => {
    expect(drawn(printFace(miller(-1, -1, 0), 'cubic', { overbar: true })).bars).toHaveLength(2);
    const long = drawn(printFace(miller(-12, 1, 0), 'cubic', { overbar: true }));
    expect(long.bars).toHaveLength(1);
    expect(long.bars[0]![0]).toBeLessThan(long.at[0]!);
    expect(long.bars[0]![1]).toBeGreaterThan(long.at[1]!);
  });

  it('set the m of point groups in italics', () => {
    const { text, italic, bars } = drawn(printSymbol('-42m'));
    expect([text, italic.join('')]).toEqual(['42m', 'm']);
    expect(bars).toHaveLength(1);
  });

  it('never hold a combining character', () => {
    expect(symbolText(layOutSymbol(printSymbol('m-3m')), { start: [0, 0], size: 9 })).not.toMatch(/[\u0300-\u036f]/);
  });
});

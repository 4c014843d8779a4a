/**
 * Contrast of the colours in tokens.css, so that a later change of a colour can't make words or marks unreadable.
 * Formula and thresholds: WCAG 2.2, relative luminance, success criteria 1.4.3 (text 4.5) and 1.4.11 (marks 3.0).
 */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const css = readFileSync('src/styles/tokens.css', 'utf8');

/** The colours of one block of rules, by name. */
function coloursAfter(selector: string): ReadonlyMap<string, string> {
  const start = css.indexOf(selector);
  if (start < 0) throw new Error(`tokens.css has no ${selector}`);
  const block = css.slice(start, css.indexOf('}', start));
  return new Map(
    [...block.matchAll(/--([a-z0-9-]+):\s*(#[0-9A-Fa-f]{6})/g)].map(([, name = '', hex = '']) => [name, hex]),
  );
}

function luminance(hex: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => {
    const channel = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(one: string, other: string): number {
  const [light = 0, dark = 0] = [luminance(one), luminance(other)].sort((a, b) => b - a);
  return (light + 0.05) / (dark + 0.05);
}

const SURFACES = ['paper', 'leaf', 'field', 'wash'];
const WORDS = ['ink', 'ink-2', 'ink-3', 'act', 'verd', 'brass', 'rouge', 'pickle'];
const TINTS = ['verd', 'brass', 'rouge', 'pickle', 'act'];

const themes = {
  paper: coloursAfter("[data-theme='paper'] {"),
  charcoal: coloursAfter("[data-theme='charcoal'] {"),
};

describe.each(Object.entries(themes))('%s', (_theme, colours) => {
  const colour = (name: string) => {
    const found = colours.get(name);
    if (found === undefined) throw new Error(`no colour ${name}`);
    return found;
  };
  const ratio = (one: string, other: string) => contrast(colour(one), colour(other));

  it('words are readable on every surface', () => {
    const weak = WORDS.flatMap((word) =>
      SURFACES.filter((surface) => ratio(word, surface) < 4.5).map((surface) => `${word} on ${surface}`),
    );
    expect(weak).toEqual([]);
  });

  it('words of a finding, and ink, are readable on its own tint', () => {
    const weak = TINTS.filter(
      (tone) => ratio(tone, `${tone}-tint`) < 4.5 || ratio('ink', `${tone}-tint`) < 4.5,
    );
    expect(weak).toEqual([]);
  });

  it('words on the primary action, the plate and the readout are readable', () => {
    expect(ratio('act-ink', 'act')).toBeGreaterThanOrEqual(4.5);
    expect(ratio('act-ink', 'act-hover')).toBeGreaterThanOrEqual(4.5);
    expect(ratio('plate-ink', 'plate')).toBeGreaterThanOrEqual(4.5);
    expect(ratio('plate-ink-2', 'plate')).toBeGreaterThanOrEqual(4.5);
    expect(ratio('plate-ink-2', 'plate-2')).toBeGreaterThanOrEqual(4.5);
    expect(ratio('win-ink', 'win')).toBeGreaterThanOrEqual(4.5);
  });

  it('edges, the focus ring and the lines of metals can be told from their ground', () => {
    const pairs = [
      ...['rule-strong', 'focus'].flatMap((mark) => SURFACES.map((surface) => [mark, surface] as const)),
      ...['au', 'ag', 'pt', 'pd', 'base'].map((metal) => [`${metal}-line`, metal] as const),
    ];
    const weak = pairs.filter(([mark, ground]) => ratio(mark, ground) < 3).map((pair) => pair.join(' on '));
    expect(weak).toEqual([]);
  });
});

it('the system’s dark setting gives the very colours of charcoal', () => {
  const bySystem = coloursAfter(':root:not([data-theme])');
  expect([...bySystem].sort()).toEqual([...themes.charcoal].sort());
});

it('charcoal has a value for each colour of paper, so that none is left over from the other theme', () => {
  expect([...themes.charcoal.keys()].sort()).toEqual([...themes.paper.keys()].sort());
});

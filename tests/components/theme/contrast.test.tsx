import fs from 'node:fs';
import path from 'node:path';
import { contrastRatio } from '@/components/theme/contrast';
import { beforeDawn, declarations, morning, type ColorName, type Palette } from '@/components/theme/tokens';

const themes: [string, Palette][] = [['morning', morning], ['before dawn', beforeDawn]];
const grounds: ColorName[] = ['ground', 'sheet'];
const tints: ColorName[] = ['hoseTint', 'waterTint', 'dryTint', 'seedTint', 'seedSheet', 'shadeTint', 'neutralTint', 'sunTint'];

// Every pair of ink and ground that the primitives put together for words.
const words: [ColorName, ColorName][] = [
  ...[...grounds, ...tints].flatMap((ground): [ColorName, ColorName][] => [['ink', ground], ['inkSoft', ground]]),
  ...grounds.flatMap((ground): [ColorName, ColorName][] => [['hose', ground], ['water', ground], ['waterInk', ground], ['dryInk', ground], ['seedInk', ground], ['shadeInk', ground]]),
  ['hose', 'hoseTint'], ['waterInk', 'waterTint'], ['dryInk', 'dryTint'], ['seedInk', 'seedTint'], ['seedInk', 'seedSheet'], ['shadeInk', 'shadeTint'],
  ['onHose', 'hose'], ['onWater', 'water'], ['onSun', 'sun'], ['onDry', 'dry'],
  ['onHero', 'hero'], ['onHeroSoft', 'hero'], ['onHero', 'heroDisc'], ['onHeroSoft', 'heroDisc'],
];

// Edges of controls and marks that carry a meaning.
const shapes: [ColorName, ColorName][] = [
  ...(['edge', 'hose', 'water', 'dry', 'seed', 'shade'] as const).flatMap((color) => grounds.map((ground): [ColorName, ColorName] => [color, ground])),
  ['edge', 'neutralTint'], ['hose', 'neutralTint'], ['sun', 'hero'],
];

describe('the measure itself', () => {
  test('black on white is 21 to 1 and a colour on itself 1 to 1 (WCAG 2.2, contrast ratio)', () => {
    expect(contrastRatio('#000000', '#FFFFFF')).toBeCloseTo(21, 5);
    expect(contrastRatio('#14708A', '#14708A')).toBe(1);
  });

  test('#767676 on white is the well-known lightest grey that passes 4.5 (common practice)', () => {
    expect(contrastRatio('#767676', '#FFFFFF')).toBeGreaterThanOrEqual(4.5);
    expect(contrastRatio('#777777', '#FFFFFF')).toBeLessThan(4.5);
  });

  test('a colour that is not written as #RRGGBB is refused', () => {
    expect(() => contrastRatio('red', '#FFFFFF')).toThrow('#RRGGBB');
  });
});

describe.each(themes)('%s', (_name, palette) => {
  test.each(words)('words in %s on %s reach 4.5 to 1 (WCAG 2.2, 1.4.3)', (ink, ground) => {
    expect(contrastRatio(palette[ink], palette[ground])).toBeGreaterThanOrEqual(4.5);
  });

  test.each(shapes)('shapes in %s on %s reach 3 to 1 (WCAG 2.2, 1.4.11)', (shape, ground) => {
    expect(contrastRatio(palette[shape], palette[ground])).toBeGreaterThanOrEqual(3);
  });

  test.each([...grounds, ...tints, 'hero', 'hose', 'sun', 'dry'] as ColorName[])('one of the two focus rings stands out from %s by 3 to 1', (ground) => {
    const best = Math.max(contrastRatio(palette.focus, palette[ground]), contrastRatio(palette.focusGap, palette[ground]));
    expect(best).toBeGreaterThanOrEqual(3);
  });
});

describe('the page carries the tokens', () => {
  const page = fs.readFileSync(path.join(__dirname, '../../../assets/web/index.html'), 'utf8');
  const block = (selector: string): string => {
    const start = page.indexOf(`${selector} {`);
    return page.slice(start, page.indexOf('}', start)).split('\n').map((line) => line.trim()).filter((line) => /^--[a-z-]+: #/.test(line)).join('\n');
  };

  test('light colours in index.html are those of tokens.ts', () => {
    expect(block(':root')).toBe(declarations(morning));
  });

  test('dark colours in index.html are those of tokens.ts', () => {
    expect(block(":root[data-theme='dark']")).toBe(declarations(beforeDawn));
  });
});

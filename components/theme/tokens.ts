/**
 * Every colour, distance and size that screens use. The colour values live on the page as CSS custom properties (`assets/web/index.html`
 * carries the same two lists, and a test keeps them equal), so a style says `colors.ink` and both themes follow without re-rendering.
 */

/** One theme: what each colour token is, as `#RRGGBB`. */
export interface Palette {
  /** The page. */
  ground: string;
  /** Cards and bars. */
  sheet: string;
  ink: string;
  inkSoft: string;
  /** Hairlines that only separate; never the edge of a control. */
  line: string;
  /** The edge of a control: at least 3:1 on ground and sheet. */
  edge: string;
  /** Primary, navigation, the hose itself. */
  hose: string;
  onHose: string;
  hoseTint: string;
  /** Irrigation and depth. */
  water: string;
  onWater: string;
  waterTint: string;
  waterInk: string;
  /** The one action that matters; sunlight. */
  sun: string;
  onSun: string;
  sunTint: string;
  /** Shade, the north side. */
  shade: string;
  shadeTint: string;
  shadeInk: string;
  /** Due, alarm, lowest quarter. */
  dry: string;
  onDry: string;
  dryTint: string;
  dryInk: string;
  /** Seeded ground. */
  seed: string;
  seedTint: string;
  seedSheet: string;
  seedInk: string;
  neutralTint: string;
  /** The one large card that answers the screen's question. */
  hero: string;
  heroDisc: string;
  onHero: string;
  onHeroSoft: string;
  focus: string;
  focusGap: string;
}

/** Light: morning. */
export const morning: Palette = {
  ground: '#EDF2EA',
  sheet: '#FFFFFF',
  ink: '#12241D',
  inkSoft: '#4C5F55',
  line: '#D3DDD1',
  edge: '#74877B',
  hose: '#0B5D4B',
  onHose: '#FFFFFF',
  hoseTint: '#DBEBE3',
  water: '#14708A',
  onWater: '#FFFFFF',
  waterTint: '#D0E6EC',
  waterInk: '#0C4F63',
  sun: '#F2B632',
  onSun: '#12241D',
  sunTint: '#FFF4D6',
  shade: '#66739A',
  shadeTint: '#E3E6F0',
  shadeInk: '#434E75',
  dry: '#BF4A26',
  onDry: '#FFFFFF',
  dryTint: '#FBE9E3',
  dryInk: '#8C3113',
  seed: '#8A6A14',
  seedTint: '#F4E6BE',
  seedSheet: '#FBF4DF',
  seedInk: '#634B08',
  neutralTint: '#E3EAE0',
  hero: '#0B5D4B',
  heroDisc: '#246D5C',
  onHero: '#FFFFFF',
  onHeroSoft: '#DCEDE5',
  focus: '#12241D',
  focusGap: '#FFFFFF',
};

/** Dark: before dawn. */
export const beforeDawn: Palette = {
  ground: '#0C1C18',
  sheet: '#152B25',
  ink: '#E9F2EC',
  inkSoft: '#A9BDB3',
  line: '#254139',
  edge: '#6F8A7E',
  hose: '#5CC9A7',
  onHose: '#0C1C18',
  hoseTint: '#1D3F35',
  water: '#63B7CC',
  onWater: '#0C1C18',
  waterTint: '#173A45',
  waterInk: '#A6DAE7',
  sun: '#F2B632',
  onSun: '#12241D',
  sunTint: '#37331B',
  shade: '#8E9AC0',
  shadeTint: '#28304A',
  shadeInk: '#BCC6E4',
  dry: '#F08A66',
  onDry: '#0C1C18',
  dryTint: '#40251B',
  dryInk: '#F8B198',
  seed: '#E3C766',
  seedTint: '#3A3216',
  seedSheet: '#2A2815',
  seedInk: '#EBD483',
  neutralTint: '#1F3730',
  hero: '#124638',
  heroDisc: '#1D5445',
  onHero: '#F3F9F5',
  onHeroSoft: '#C9DED4',
  focus: '#E9F2EC',
  focusGap: '#0C1C18',
};

/** Name of a colour token. */
export type ColorName = keyof Palette;

/** `inkSoft` → `--ink-soft`: the custom property that carries a token on the page. */
export function customProperty(name: ColorName): string {
  return `--${name.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`;
}

const colorNames = Object.keys(morning) as ColorName[];

/** The value to write into a style, for example `colors.inkSoft` = `var(--ink-soft)`. Follows the theme by itself. */
export const colors = Object.fromEntries(colorNames.map((name) => [name, `var(${customProperty(name)})`])) as Record<ColorName, string>;

/** The declarations of one palette as they stand in a style sheet, one per line, in the order of the tokens. */
export function declarations(palette: Palette): string {
  return colorNames.map((name) => `${customProperty(name)}: ${palette[name]};`).join('\n');
}

/** Distances [px]; a style uses one of these. */
export type Space = 0 | 4 | 8 | 12 | 16 | 20 | 28 | 40;

/** Corner radii [px]. */
export const radius = { control: 12, card: 16, hero: 22, pill: 999 } as const;

/** Type sizes [px at the browser's default text size]. */
export const typeSize = { small: 13, body: 15, lead: 17, title: 20, section: 25, page: 32, large: 40, countdown: 78 } as const;

/** The smallest side of anything that can be pressed [px]. */
export const targetPx = 44;

/** The one shadow: lifts a dialog, a toast or the bottom bar off the page. */
export const shadow = '0 8px 28px rgba(6, 24, 18, 0.16)';

/** Width from which list and detail stand side by side [px]. */
export const widePx = 900;

/** Width under which tables become cards [px]. */
export const narrowPx = 500;

export const fonts = {
  display: "'Bricolage Grotesque', 'Bricolage Fallback Arial', 'Bricolage Fallback Roboto', 'Bricolage Fallback DejaVu', sans-serif",
  text: "'Atkinson Hyperlegible Next', 'Atkinson Fallback Arial', 'Atkinson Fallback Roboto', 'Atkinson Fallback DejaVu', sans-serif",
} as const;

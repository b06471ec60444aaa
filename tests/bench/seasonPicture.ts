import { morning } from '@/components/theme/tokens';
import type { CurvePoint, YardResult } from './seasonResults';

const PANEL = { width: 316, height: 396, gap: 14, top: 16 };
const PLOT = { left: 52, right: 18, top: 74, bottom: 58 };
const FONT = '\'Atkinson Hyperlegible Next\', \'Segoe UI\', system-ui, sans-serif';
const HEADING = '\'Bricolage Grotesque\', \'Segoe UI\', system-ui, sans-serif';

const round = (value: number): string => value.toFixed(1);

/** A step of 1, 2, 2.5 or 5 times a power of ten that cuts a range in about so many parts. */
function stepFor(range: number, parts: number): number {
  const raw = range / parts;
  const power = 10 ** Math.floor(Math.log10(raw));
  return ([1, 2, 2.5, 5, 10].find((factor) => factor * power >= raw) ?? 10) * power;
}

function ticks(until: number, parts: number): number[] {
  const step = stepFor(until, parts);
  return Array.from({ length: Math.floor(until / step + 1e-9) + 1 }, (_, index) => index * step);
}

function text(x: number, y: number, content: string, { size = 15, colour = morning.ink, anchor = 'start', weight = 400, font = FONT } = {}): string {
  return `<text x="${round(x)}" y="${round(y)}" font-family="${font}" font-size="${size}" font-weight="${weight}" fill="${colour}" text-anchor="${anchor}">${content}</text>`;
}

function panel({ yard, dapple, clairvoyant, thumbs }: YardResult, offsetX: number): string {
  const curves = [
    { ...thumbs.fixed, label: '20 minutes', labelledAt: 1, side: 1, colour: morning.dry, dash: '7 4' },
    { ...thumbs.inch, label: 'inch a week', labelledAt: 0.75, side: -1, colour: morning.shade, dash: '' },
  ];
  const inside = [dapple, clairvoyant, ...curves.flatMap(({ curve }) => curve)];
  const waterTop = Math.max(...inside.map((point) => point.waterM3)) * 1.08;
  const stressTop = Math.max(...inside.map((point) => point.stressDays)) * 1.1;
  const plotWidth = PANEL.width - PLOT.left - PLOT.right;
  const plotHeight = PANEL.height - PLOT.top - PLOT.bottom;
  const x = (waterM3: number) => offsetX + PLOT.left + (plotWidth * waterM3) / waterTop;
  const y = (stressDays: number) => PANEL.top + PLOT.top + plotHeight * (1 - stressDays / stressTop);
  const path = (points: readonly CurvePoint[]) => points.map((point, index) => `${index === 0 ? 'M' : 'L'}${round(x(point.waterM3))} ${round(y(point.stressDays))}`).join(' ');
  const parts: string[] = [
    `<rect x="${offsetX}" y="${PANEL.top}" width="${PANEL.width}" height="${PANEL.height}" rx="16" fill="${morning.sheet}"/>`,
    text(offsetX + 20, PANEL.top + 34, yard.title, { size: 20, weight: 620, font: HEADING }),
    text(offsetX + 20, PANEL.top + 57, 'stress days a season', { size: 13, colour: morning.inkSoft }),
  ];
  for (const tick of ticks(stressTop, 4)) {
    parts.push(`<line x1="${round(x(0))}" x2="${round(x(waterTop))}" y1="${round(y(tick))}" y2="${round(y(tick))}" stroke="${morning.line}"/>`);
    parts.push(text(x(0) - 8, y(tick) + 4.5, String(tick), { size: 13, colour: morning.inkSoft, anchor: 'end' }));
  }
  for (const tick of ticks(waterTop, 4)) parts.push(text(x(tick), y(0) + 20, String(tick), { size: 13, colour: morning.inkSoft, anchor: 'middle' }));
  parts.push(text(x(waterTop), y(0) + 42, 'water [m³ a season]', { size: 13, colour: morning.inkSoft, anchor: 'end' }));
  parts.push(`<clipPath id="plot-${yard.id}"><rect x="${round(x(0))}" y="${round(y(stressTop))}" width="${round(plotWidth)}" height="${round(plotHeight + 12)}"/></clipPath>`);
  for (const { curve, beyond, label, labelledAt, side, colour, dash } of curves) {
    const last = curve[curve.length - 1];
    const labelled = curve.find((point) => point.scale === labelledAt);
    if (!labelled || !last) continue;
    parts.push(`<path d="${path([last, ...beyond])}" fill="none" stroke="${colour}" stroke-width="1.5" stroke-dasharray="1.5 4" clip-path="url(#plot-${yard.id})"/>`);
    parts.push(`<path d="${path(curve)}" fill="none" stroke="${colour}" stroke-width="2.5" stroke-linejoin="round"${dash ? ` stroke-dasharray="${dash}"` : ''}/>`);
    for (const point of curve) parts.push(`<circle cx="${round(x(point.waterM3))}" cy="${round(y(point.stressDays))}" r="${point.scale === 1 ? 5 : 3}" fill="${colour}"/>`);
    parts.push(text(x(labelled.waterM3) + side * 10, y(labelled.stressDays) - side * 4 + 4, label, { size: 13, colour, anchor: side > 0 ? 'start' : 'end' }));
  }
  const dappleX = x(dapple.waterM3);
  const dappleY = y(dapple.stressDays);
  // The soft overlapping discs are the product's own sign: water from two positions that meet.
  parts.push(`<circle cx="${round(dappleX - 5)}" cy="${round(dappleY)}" r="13" fill="${morning.hose}" fill-opacity="0.18"/><circle cx="${round(dappleX + 5)}" cy="${round(dappleY)}" r="13" fill="${morning.hose}" fill-opacity="0.18"/>`);
  parts.push(`<circle cx="${round(x(clairvoyant.waterM3))}" cy="${round(y(clairvoyant.stressDays))}" r="6.5" fill="${morning.sheet}" stroke="${morning.water}" stroke-width="2.5"/>`);
  parts.push(`<circle cx="${round(dappleX)}" cy="${round(dappleY)}" r="6.5" fill="${morning.hose}"/>`);
  const hasRoomBelow = dappleY + 40 < y(0);
  ['knows', 'the weather'].forEach((word, line) => parts.push(text(x(clairvoyant.waterM3) - (hasRoomBelow ? 26 : 12), y(clairvoyant.stressDays) - 20 + 14 * line + (hasRoomBelow ? 14 : 0), word, { size: 13, colour: morning.water, anchor: 'end' })));
  parts.push(text(hasRoomBelow ? dappleX : dappleX - 12, dappleY + (hasRoomBelow ? 32 : -18), 'Dapple', { size: 15, weight: 700, colour: morning.hose, anchor: hasRoomBelow ? 'middle' : 'start' }));
  return parts.join('\n');
}

/** The water–stress plane of every yard beside each other, as an SVG of its own. */
export function seasonsPicture(results: readonly YardResult[]): string {
  const width = results.length * PANEL.width + (results.length + 1) * PANEL.gap;
  const height = PANEL.height + 2 * PANEL.top;
  const said = results.map(({ yard, dapple, clairvoyant }) => `${yard.title}: Dapple ${Math.round(dapple.waterM3)} m³ and ${dapple.stressDays.toFixed(1)} stress days, who knows the weather ${Math.round(clairvoyant.waterM3)} m³ and ${clairvoyant.stressDays.toFixed(1)}`).join('; ');
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}" width="${width}" height="${height}" role="img">`,
    '<title>Water against stress in a season</title>',
    `<desc>${said}.</desc>`,
    `<rect width="${width}" height="${height}" rx="22" fill="${morning.ground}"/>`,
    ...results.map((result, index) => panel(result, PANEL.gap + index * (PANEL.width + PANEL.gap))),
    '</svg>',
    '',
  ].join('\n');
}

/**
 * Contrast ratio of two opaque colours, 1 to 21.
 * @param first colour as `#RRGGBB`
 * @param second colour as `#RRGGBB`
 * @throws Error when a colour is not written as `#RRGGBB`
 * @source WCAG 2.2, definitions of "relative luminance" and "contrast ratio"
 */
export function contrastRatio(first: string, second: string): number {
  const [a, b] = [relativeLuminance(first), relativeLuminance(second)];
  return (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05);
}

function relativeLuminance(color: string): number {
  const channels = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(color);
  if (!channels) throw new Error(`Not a colour written as #RRGGBB: ${color}`);
  const [red = 0, green = 0, blue = 0] = channels.slice(1).map((hex) => {
    const share = parseInt(hex, 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

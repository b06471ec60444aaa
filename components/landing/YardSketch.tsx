import type { ReactElement } from 'react';
import Svg, { Circle, G, Path, Rect, Text as SvgText } from 'react-native-svg';
import { colors, fonts } from '@/components/theme/tokens';

const crown = [[318, 46, 20], [340, 40, 22], [330, 64, 22], [352, 62, 20], [310, 66, 16], [342, 84, 17]] as const;
const positions = [[118, 178, '1'], [226, 178, '2']] as const;

/** The idea in one drawing: a tap, a hose, two positions whose wet circles overlap, and a tree whose shade keeps its ground moist. */
export function YardSketch(): ReactElement {
  return (
    <Svg width="100%" height="100%" viewBox="0 0 400 280" role="img" aria-label="A lawn from above. The hose runs from the tap to position 1; moved to position 2, the two wet circles overlap. A tree shades the corner.">
      <Rect x={0} y={0} width={400} height={280} rx={22} fill={colors.neutralTint} />
      <Rect x={28} y={92} width={344} height={164} rx={4} fill={colors.hose} fillOpacity={0.26} />
      <Rect x={28} y={24} width={190} height={54} rx={3} fill={colors.sheet} stroke={colors.edge} strokeWidth={1.5} />
      <SvgText x={123} y={56} fontFamily={fonts.text} fontSize={15} fill={colors.inkSoft} textAnchor="middle">House</SvgText>
      {positions.map(([x, y]) => <Circle key={x} cx={x} cy={y} r={70} fill={colors.water} fillOpacity={0.32} />)}
      <G fill={colors.shade} fillOpacity={0.3}>
        {crown.map(([x, y, r]) => <Circle key={`${x}-shade`} cx={x + 14} cy={y + 40} r={r} />)}
      </G>
      <G fill={colors.hose} fillOpacity={0.42}>
        {crown.map(([x, y, r]) => <Circle key={x} cx={x} cy={y} r={r} />)}
      </G>
      <Path d="M62 78 C 40 120, 58 160, 100 176" stroke={colors.hose} strokeWidth={5} strokeLinecap="round" fill="none" />
      <Path d="M140 178 L 200 178" stroke={colors.ink} strokeWidth={2} strokeDasharray="2 6" strokeLinecap="round" fill="none" />
      <Path d="M194 172 L 202 178 L 194 184" stroke={colors.ink} strokeWidth={2} strokeLinecap="round" strokeLinejoin="round" fill="none" />
      <Circle cx={62} cy={78} r={8} fill={colors.hose} />
      <SvgText x={170} y={166} fontFamily={fonts.text} fontSize={15} fontWeight={600} fill={colors.ink} textAnchor="middle">move</SvgText>
      {positions.map(([x, y, name]) => (
        <G key={name}>
          <Circle cx={x} cy={y} r={17} fill={colors.sheet} stroke={colors.water} strokeWidth={2.5} />
          <SvgText x={x} y={y + 6} fontFamily={fonts.display} fontSize={17} fontWeight={640} fill={colors.ink} textAnchor="middle">{name}</SvgText>
        </G>
      ))}
    </Svg>
  );
}

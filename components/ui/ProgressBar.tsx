import type { ReactElement } from 'react';
import { View } from 'react-native';
import { colors, radius, type ColorName } from '@/components/theme/tokens';
import { Row } from '@/components/ui/Row';
import { Text } from '@/components/ui/Text';

export interface ProgressBarProps {
  /** What is progressing. */
  label: string;
  /** Done so far, in the unit of `max`. */
  value: number;
  max?: number;
  /** How it reads: "3 of 10 days". Default: per cent. */
  valueText?: string;
  color?: ColorName;
  hideLabel?: boolean;
}

/** How far something is. */
export function ProgressBar({ label, value, max = 100, valueText, color = 'hose', hideLabel }: ProgressBarProps): ReactElement {
  const share = max > 0 ? Math.min(1, Math.max(0, value / max)) : 0;
  const words = valueText ?? `${Math.round(share * 100)}%`;
  return (
    <View style={{ gap: 4 }}>
      {!hideLabel && (
        <Row justify="space-between">
          <Text variant="small">{label}</Text>
          <Text variant="small" tabular>{words}</Text>
        </Row>
      )}
      <View
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={max}
        aria-valuenow={Math.min(max, Math.max(0, value))}
        aria-valuetext={words}
        style={{ height: 8, borderRadius: radius.pill, backgroundColor: colors.neutralTint, overflow: 'hidden' }}
      >
        <View style={{ height: 8, width: `${share * 100}%`, borderRadius: radius.pill, backgroundColor: colors[color] }} />
      </View>
    </View>
  );
}

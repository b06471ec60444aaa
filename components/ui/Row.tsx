import type { ReactElement } from 'react';
import type { FlexAlignType, ViewStyle } from 'react-native';
import { Box, type BoxProps } from '@/components/ui/Box';

export interface RowProps extends BoxProps {
  align?: FlexAlignType;
  justify?: ViewStyle['justifyContent'];
  /** Lets children go to a second line; on unless switched off, so that large text and small screens fit. */
  wrap?: boolean;
}

/** Children side by side, 12 px apart unless told otherwise. */
export function Row({ gap = 12, align = 'center', justify, wrap = true, style, ...rest }: RowProps): ReactElement {
  return (
    <Box
      gap={gap}
      {...rest}
      style={[{ flexDirection: 'row', alignItems: align, flexWrap: wrap ? 'wrap' : 'nowrap' }, justify && { justifyContent: justify }, style]}
    />
  );
}

import type { ReactElement } from 'react';
import type { FlexAlignType } from 'react-native';
import { Box, type BoxProps } from '@/components/ui/Box';

export interface StackProps extends BoxProps {
  align?: FlexAlignType;
}

/** Children one below the other, 12 px apart unless told otherwise. */
export function Stack({ gap = 12, align, style, ...rest }: StackProps): ReactElement {
  return <Box gap={gap} {...rest} style={[align && { alignItems: align }, style]} />;
}

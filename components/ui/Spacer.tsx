import type { ReactElement } from 'react';
import { View } from 'react-native';
import type { Space } from '@/components/theme/tokens';

/** Empty room: of one size, or without one all the room that is left. */
export function Spacer({ size }: { size?: Space }): ReactElement {
  return <View style={size === undefined ? { flexGrow: 1 } : { width: size, height: size }} />;
}

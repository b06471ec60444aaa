import type { ReactElement, ReactNode } from 'react';
import { Text as NativeText } from 'react-native';

/** Words that are heard and not seen. */
export function VisuallyHidden({ children, role, id }: { children: ReactNode; role?: 'status' | 'alert'; id?: string }): ReactElement {
  return (
    <NativeText role={role} nativeID={id} style={{ position: 'absolute', width: 1, height: 1, margin: -1, overflow: 'hidden' }} numberOfLines={1}>
      {children}
    </NativeText>
  );
}

import type { ReactElement } from 'react';
import { NotFoundScreen } from '@/components/shell/NotFoundScreen';

export default function NotFound(): ReactElement {
  return <NotFoundScreen />;
}

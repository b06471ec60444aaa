import type { ReactElement } from 'react';
import { GalleryScreen } from '@/components/gallery/GalleryScreen';
import { PublicShell } from '@/components/shell/PublicShell';

export default function Gallery(): ReactElement {
  return (
    <PublicShell>
      <GalleryScreen />
    </PublicShell>
  );
}

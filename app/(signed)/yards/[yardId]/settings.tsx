import { useLocalSearchParams } from 'expo-router';
import type { ReactElement } from 'react';
import { SettingsScreen } from '@/components/yard/SettingsScreen';

export default function SettingsRoute(): ReactElement {
  const { yardId } = useLocalSearchParams<{ yardId: string }>();
  return <SettingsScreen yardId={yardId} />;
}

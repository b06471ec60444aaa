import { useRouter } from 'expo-router';
import type { ReactElement } from 'react';
import { useSignOut } from '@/components/data/useAccount';
import { useSession } from '@/components/data/session';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Screen } from '@/components/ui/Screen';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { DeleteAccount } from './DeleteAccount';
import { NameForm } from './NameForm';
import { PasswordForm } from './PasswordForm';
import { SessionList } from './SessionList';
import { ThemeForm } from './ThemeForm';

/** One's own name, password, devices and data. */
export function AccountScreen(): ReactElement | null {
  const session = useSession();
  const signOut = useSignOut();
  const router = useRouter();
  if (session.status !== 'signed_in') {
    return null;
  }
  const leave = async () => {
    await signOut();
    router.replace('/');
  };
  return (
    <Screen title="Account" headline={session.me.name} kicker={session.me.email} width="form" actions={<Button label="Sign out" onPress={() => void leave()} />}>
      <Stack gap={20}>
        <Card padding={20}><NameForm me={session.me} /></Card>
        <Card padding={20}><ThemeForm /></Card>
        <Card padding={20}><PasswordForm /></Card>
        <Card padding={20} gap={12}>
          <Text variant="heading3" level={2}>Where you are signed in</Text>
          <SessionList />
        </Card>
        <Card padding={20}><DeleteAccount /></Card>
      </Stack>
    </Screen>
  );
}

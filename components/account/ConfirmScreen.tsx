import { useRouter } from 'expo-router';
import type { ReactElement } from 'react';
import { useConfirmEmail } from '@/components/data/useAccount';
import { errorMessage } from '@/components/data/apiError';
import { Button } from '@/components/ui/Button';
import { LinkButton } from '@/components/ui/LinkButton';
import { Notice } from '@/components/ui/Notice';
import { Row } from '@/components/ui/Row';
import { Screen } from '@/components/ui/Screen';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';

/** Where the link of the confirmation mail leads. A press confirms, so that a mail scanner that opens links does not use it up. */
export function ConfirmScreen({ token }: { token: string | undefined }): ReactElement {
  const router = useRouter();
  const confirmEmail = useConfirmEmail();
  const confirm = () => {
    confirmEmail.mutate({ token: token ?? '' }, { onSuccess: () => router.replace('/home') });
  };
  const usable = token !== undefined && token.length >= 20;
  return (
    <Screen title="Confirm your address" headline={usable ? 'Is this your address?' : 'This link is not whole'} width="form">
      <Stack gap={16}>
        <Text>{usable ? 'Confirm that reminders may go to the address this link was sent to.' : 'Part of the link is missing. Open it again from the mail, or ask for a new one.'}</Text>
        {confirmEmail.error ? <Notice tone="problem">{errorMessage(confirmEmail.error)}</Notice> : null}
        <Row>
          {usable ? <Button kind="sun" label="Confirm and go in" onPress={confirm} pending={confirmEmail.isPending} /> : null}
          <LinkButton label="Sign in" href="/sign-in" />
        </Row>
      </Stack>
    </Screen>
  );
}

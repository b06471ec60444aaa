import { useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { useClock } from '@/components/data/useClock';
import { useResendConfirmation } from '@/components/data/useAccount';
import { Button } from '@/components/ui/Button';
import { Notice } from '@/components/ui/Notice';
import { Row } from '@/components/ui/Row';
import { Screen } from '@/components/ui/Screen';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';

/** After signing up, or after a right password with an address that is not confirmed yet. */
export function CheckYourMail({ email }: { email: string }): ReactElement {
  const resend = useResendConfirmation();
  const clock = useClock();
  const [said, setSaid] = useState<string | null>(null);
  const again = async () => {
    try {
      await resend.mutateAsync({ email });
      setSaid('Sent again. It can take a minute.');
    } catch (error) {
      setSaid(errorMessage(error));
    }
  };
  return (
    <Screen title="Check your mail" headline="One link to go" width="form">
      <Stack gap={16}>
        <Text>We sent a link to {email}. Open it on this device and you are in. It works for two days.</Text>
        {clock.data?.isDemonstration ? (
          <Notice tone="info" actions={<TextLink kind="standalone" href="/demo/mail">Read the demonstration’s mail</TextLink>}>
            This is the demonstration: its mail stays here.
          </Notice>
        ) : null}
        {said !== null ? <Text role="status" color="inkSoft">{said}</Text> : null}
        <Row>
          <Button label="Send the link again" onPress={() => void again()} pending={resend.isPending} />
          <TextLink kind="standalone" href="/sign-in">Back to sign in</TextLink>
        </Row>
      </Stack>
    </Screen>
  );
}

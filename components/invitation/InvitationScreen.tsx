import { useRouter, type Href } from 'expo-router';
import { useEffect, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { resumeSession, useSession } from '@/components/data/session';
import { useSignOut } from '@/components/data/useAccount';
import { useRead, useWrite } from '@/components/data/useApi';
import { Button } from '@/components/ui/Button';
import { ErrorState } from '@/components/ui/ErrorState';
import { LinkButton } from '@/components/ui/LinkButton';
import { Notice } from '@/components/ui/Notice';
import { Row } from '@/components/ui/Row';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { InvitationPreviewResponse } from '@/shared/contracts/yards';
import type { Role } from '@/shared/contracts/common';

const parts: Record<Role, string> = {
  owner: 'As an owner you see and change everything and answer proposals.',
  helper: 'As a helper you see what is to do today, run rounds and write down rain. Settings stay with the owner.',
  consultant: 'As a consultant you see the whole yard, edit its facts and propose doses for seeded ground. The owner accepts or declines.',
};

/** Where the link of an invitation leads. */
export function InvitationScreen({ token }: { token: string | undefined }): ReactElement {
  const session = useSession();
  useEffect(() => {
    void resumeSession();
  }, []);
  const preview = useRead<InvitationPreviewResponse>(keys.invitation(token ?? ''), `/invitations/${encodeURIComponent(token ?? '')}`, { anonymous: true, enabled: token !== undefined && token !== '' });
  if (token === undefined || token === '' || preview.isError) {
    return (
      <Screen title="Invitation" headline="This invitation does not open" width="form">
        <ErrorState title="The link is not whole, was used, or is over" detail={preview.error ? errorMessage(preview.error) : undefined} kept="Ask the owner of the yard for a new invitation."
          actions={<LinkButton label="Go to the front page" href="/" />} />
      </Screen>
    );
  }
  if (!preview.data || session.status === 'unknown') {
    return <Screen title="Invitation" width="form"><Skeleton label="Loading the invitation" lines={4} /></Screen>;
  }
  return (
    <Screen title="Invitation" headline={`${preview.data.invitedBy ?? 'An owner'} invites you to ${preview.data.yardName}`} width="form">
      <Stack gap={16}>
        <Text>{parts[preview.data.role]}</Text>
        {session.status === 'signed_in'
          ? <Accept token={token} preview={preview.data} myEmail={session.me.email} />
          : <SignInFirst token={token} email={preview.data.email} />}
      </Stack>
    </Screen>
  );
}

function SignInFirst({ token, email }: { token: string; email: string }): ReactElement {
  const next = encodeURIComponent(`/invitation?token=${token}`);
  return (
    <Stack gap={12}>
      <Text color="inkSoft">{`The invitation is for ${email}. Sign in with that address, or make an account with it.`}</Text>
      <Row>
        <LinkButton kind="sun" label="Make an account" href={`/sign-up?email=${encodeURIComponent(email)}&next=${next}` as Href} />
        <LinkButton label="Sign in" href={`/sign-in?next=${next}` as Href} />
      </Row>
      <Text variant="small">After confirming a new account, open the invitation once more from its mail.</Text>
    </Stack>
  );
}

function Accept({ token, preview, myEmail }: { token: string; preview: InvitationPreviewResponse; myEmail: string }): ReactElement {
  const router = useRouter();
  const signOut = useSignOut();
  const accept = useWrite<{ yardId: string }, void>(() => ({ method: 'POST', path: '/invitations/accept', body: { token } }), { stale: [keys.yards, keys.portfolio] });
  const decline = useWrite<{ done: true }, void>(() => ({ method: 'POST', path: '/invitations/decline', body: { token } }));
  if (myEmail !== preview.email) {
    return (
      <Notice tone="info" title="Another address" actions={<Button label="Sign out" onPress={() => void signOut()} />}>
        {`The invitation is for ${preview.email}; you are signed in as ${myEmail}.`}
      </Notice>
    );
  }
  if (decline.isSuccess) {
    return <Text>Declined. The owner is told nothing else about you.</Text>;
  }
  const error = accept.error ?? decline.error;
  return (
    <Stack gap={12}>
      {error ? <Notice tone="problem">{errorMessage(error)}</Notice> : null}
      <Row>
        <Button kind="sun" label="Join this yard" pending={accept.isPending}
          onPress={() => accept.mutate(undefined, { onSuccess: ({ yardId }) => router.replace(`/yards/${yardId}/today` as Href) })} />
        <Button label="No, thank you" pending={decline.isPending} onPress={() => decline.mutate(undefined)} />
      </Row>
    </Stack>
  );
}

import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { useEndOtherSessions, useEndSession, useSessions } from '@/components/data/useAccount';
import { Button } from '@/components/ui/Button';
import { ErrorState } from '@/components/ui/ErrorState';
import { Row } from '@/components/ui/Row';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';

const when = new Intl.DateTimeFormat(undefined, { dateStyle: 'medium', timeStyle: 'short' });

/** Devices with a running session, each of which can be signed out from here. */
export function SessionList(): ReactElement {
  const sessions = useSessions();
  const end = useEndSession();
  const endOthers = useEndOtherSessions();
  if (sessions.isPending) {
    return <Skeleton label="Loading your devices" lines={2} />;
  }
  if (sessions.isError) {
    return <ErrorState title="Your devices could not be listed" detail={errorMessage(sessions.error)} onRetry={() => void sessions.refetch()} retrying={sessions.isFetching} />;
  }
  const complain = (error: unknown) => void showToast({ message: errorMessage(error), tone: 'problem' });
  return (
    <Stack gap={12}>
      {sessions.data.sessions.map((session) => (
        <Row key={session.id} justify="space-between">
          <Stack gap={4}>
            <Text bold>{session.device}</Text>
            <Text variant="small" color="inkSoft">{`Last used ${when.format(new Date(session.lastUsedAt))}`}</Text>
          </Stack>
          {session.isThisOne ? <Tag label="This one" tone="hose" /> : (
            <Button size="small" label="Sign out" accessibleLabel={`Sign out ${session.device}`} onPress={() => end.mutate({ sessionId: session.id }, { onError: complain })} />
          )}
        </Row>
      ))}
      {sessions.data.sessions.length > 1 ? (
        <Button label="Sign out all others" pending={endOthers.isPending} onPress={() => endOthers.mutate(undefined, { onError: complain })} />
      ) : null}
    </Stack>
  );
}

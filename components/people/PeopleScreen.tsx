import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead } from '@/components/data/useApi';
import { useYard } from '@/components/data/useYard';
import { Card } from '@/components/ui/Card';
import { ErrorState } from '@/components/ui/ErrorState';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { MemberListResponse, YardResponse } from '@/shared/contracts/yards';
import { capital, counted } from '@/shared/roundWords';
import { InviteForm } from './InviteForm';
import { MemberList } from './MemberList';
import { Preferences } from './Preferences';
import { roleWords } from './roleWords';

/** Who belongs to the yard, and which reminders come to oneself. */
export function PeopleScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  if (yard.error) {
    return (
      <Screen title="People">
        <ErrorState title="The yard could not be loaded" detail={errorMessage(yard.error)} onRetry={() => void yard.refetch()} retrying={yard.isFetching} />
      </Screen>
    );
  }
  if (!yard.data) {
    return <Screen title="People"><Skeleton label="Loading the people" lines={5} /></Screen>;
  }
  return yard.data.abilities['members.read'] ? <Everybody yard={yard.data} /> : (
    <Screen title="People" headline={`You are a ${roleWords[yard.data.role].name.toLowerCase()} here.`} kicker={yard.data.name} width="form">
      <Stack gap={20}>
        <Text>{roleWords[yard.data.role].does}</Text>
        <Preferences yard={yard.data} />
      </Stack>
    </Screen>
  );
}

function Everybody({ yard }: { yard: YardResponse }): ReactElement {
  const members = useRead<MemberListResponse>(keys.members(yard.id), `/yards/${yard.id}/members`);
  if (members.error) {
    return (
      <Screen title="People" kicker={yard.name}>
        <ErrorState title="The people could not be listed" detail={errorMessage(members.error)} onRetry={() => void members.refetch()} retrying={members.isFetching} />
      </Screen>
    );
  }
  const count = members.data?.members.length ?? 0;
  return (
    <Screen title="People" headline={members.data ? (count === 1 ? 'Only you so far.' : `${capital(counted(count, 'person').replace('persons', 'people'))} look after this yard.`) : 'People'} kicker={yard.name}>
      <div className="w-columns">
        <Stack gap={20}>
          {members.data ? <MemberList yard={yard} list={members.data} /> : <Skeleton label="Loading the people" lines={5} />}
          <Preferences yard={yard} />
        </Stack>
        <Stack gap={20}>
          {yard.abilities['members.manage'] ? <Card padding={20}><InviteForm yard={yard} /></Card> : null}
          {yard.abilities['history.read'] ? (
            <Card padding={20} gap={8}>
              <Text variant="heading3" level={2}>Who did what</Text>
              <TextLink kind="standalone" href={`/yards/${yard.id}/history` as Href}>Open the yard’s history</TextLink>
              <TextLink kind="standalone" href={`/yards/${yard.id}/proposals` as Href}>Proposals and answers</TextLink>
            </Card>
          ) : null}
        </Stack>
      </div>
    </Screen>
  );
}

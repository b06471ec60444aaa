import { useRouter } from 'expo-router';
import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useWrite } from '@/components/data/useApi';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { confirm } from '@/components/ui/confirm';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import type { MemberListResponse, YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay } from '@/shared/display';
import { civilDayAt } from '@/shared/time';
import { roleWords } from './roleWords';

type Member = MemberListResponse['members'][number];
interface Done { done: true }

/** Members and open invitations, with what the owner may do about them. */
export function MemberList({ yard, list }: { yard: YardResponse; list: MemberListResponse }): ReactElement {
  const router = useRouter();
  const stale = [keys.members(yard.id), keys.yards];
  const remove = useWrite<Done, { userId: string }>(({ userId }) => ({ method: 'DELETE', path: `/yards/${yard.id}/members/${userId}` }), { stale });
  const withdraw = useWrite<Done, { invitationId: string }>(({ invitationId }) => ({ method: 'DELETE', path: `/yards/${yard.id}/invitations/${invitationId}` }), { stale });
  const complain = (error: unknown) => void showToast({ message: errorMessage(error), tone: 'problem' });
  const manages = yard.abilities['members.manage'] === true;
  const day = (instant: string) => formatCivilDay(civilDayAt(new Date(instant), yard.timeZone), 'dated');
  const leave = async (member: Member) => {
    const sure = await confirm(member.isYou
      ? { title: `Leave ${yard.name}?`, body: 'You will not see this yard any more. Its records stay.', confirmLabel: 'Leave the yard', tone: 'danger' }
      : { title: `Remove ${member.name}?`, body: `${member.name} will not see this yard any more. What they did stays in its history.`, confirmLabel: 'Remove from the yard', tone: 'danger' });
    if (sure) {
      remove.mutate({ userId: member.id }, { onError: complain, onSuccess: () => { if (member.isYou) { router.replace('/yards'); } } });
    }
  };
  return (
    <>
      <Card padding={20} gap={16}>
        {list.members.map((member) => (
          <Row key={member.id} justify="space-between">
            <Stack gap={4} style={{ flexShrink: 1, minWidth: 0 }}>
              <Row gap={8}>
                <Text variant="label">{member.name}</Text>
                <Tag label={roleWords[member.role].name} tone={member.role === 'owner' ? 'hose' : member.role === 'consultant' ? 'seed' : 'neutral'} />
                {member.isYou ? <Tag label="You" /> : null}
              </Row>
              <Text variant="small">{`${member.email} · since ${day(member.since)}`}</Text>
            </Stack>
            {manages || member.isYou ? (
              <Button size="small" label={member.isYou ? 'Leave' : 'Remove'} accessibleLabel={member.isYou ? 'Leave this yard' : `Remove ${member.name}`} onPress={() => void leave(member)} />
            ) : null}
          </Row>
        ))}
      </Card>
      {list.invitations.length > 0 ? (
        <Card padding={20} gap={16}>
          <Text variant="heading3" level={2}>Invited, not here yet</Text>
          {list.invitations.map((invitation) => (
            <Row key={invitation.id} justify="space-between">
              <Stack gap={4}>
                <Text variant="label">{invitation.email}</Text>
                <Text variant="small">{`${roleWords[invitation.role].name} · open until ${day(invitation.expiresAt)}`}</Text>
              </Stack>
              {manages ? <Button size="small" label="Withdraw" accessibleLabel={`Withdraw the invitation of ${invitation.email}`} onPress={() => withdraw.mutate({ invitationId: invitation.id }, { onError: complain })} /> : null}
            </Row>
          ))}
        </Card>
      ) : null}
    </>
  );
}

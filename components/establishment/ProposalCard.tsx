import { useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useWrite } from '@/components/data/useApi';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Notice } from '@/components/ui/Notice';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Tag, type Tone } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import { useSession } from '@/components/data/session';
import type { ProposalResponse, ProposalStatus } from '@/shared/contracts/proposals';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay } from '@/shared/display';
import { limits } from '@/shared/limits';
import { civilDayAt } from '@/shared/time';
import { StageCards } from './StageCards';

const statusTags: Record<ProposalStatus, { label: string; tone: Tone }> = {
  open: { label: 'Waiting for the owner', tone: 'seed' }, accepted: { label: 'Accepted', tone: 'hose' }, declined: { label: 'Declined', tone: 'dry' }, withdrawn: { label: 'Withdrawn', tone: 'neutral' },
};

/** One proposal: why, what it changes, and the answer or the way to give one. */
export function ProposalCard({ yard, proposal }: { yard: YardResponse; proposal: ProposalResponse }): ReactElement {
  const session = useSession();
  const on = (instant: string) => formatCivilDay(civilDayAt(new Date(instant), yard.timeZone), 'dated');
  const tag = statusTags[proposal.status];
  const mine = session.status === 'signed_in' && proposal.author?.id === session.me.id;
  return (
    <Card tone="seed" padding={20} gap={12}>
      <Row justify="space-between">
        <Text variant="heading3" level={2}>{`Other doses for ${proposal.zoneName}`}</Text>
        <Tag label={tag.label} tone={tag.tone} />
      </Row>
      <Stack gap={4}>
        <Text>{proposal.reason}</Text>
        <Text variant="small">{`${proposal.author?.name ?? 'Somebody who has left'}, ${on(proposal.createdAt)}`}</Text>
      </Stack>
      <StageCards schedule={proposal.schedule} before={proposal.scheduleBefore} units={yard.units} />
      {proposal.decidedAt ? (
        <Text>{`${tag.label} by ${proposal.decidedBy?.name ?? 'the owner'} on ${on(proposal.decidedAt)}${proposal.answer === '' ? '.' : `: ${proposal.answer}`}`}</Text>
      ) : null}
      {proposal.status === 'open' && yard.abilities['proposal.decide'] ? <Decide yard={yard} proposal={proposal} /> : null}
      {proposal.status === 'open' && mine ? <Withdraw yard={yard} proposal={proposal} /> : null}
    </Card>
  );
}

function Decide({ yard, proposal }: { yard: YardResponse; proposal: ProposalResponse }): ReactElement {
  const [answer, setAnswer] = useState('');
  const decide = useWrite<ProposalResponse, { decision: 'accept' | 'decline'; answer: string }>(
    (body) => ({ method: 'POST', path: `/yards/${yard.id}/proposals/${proposal.id}/decision`, body }), { stale: [keys.yard(yard.id), keys.portfolio] },
  );
  const give = (decision: 'accept' | 'decline') => {
    decide.mutate({ decision, answer: answer.trim() }, {
      onSuccess: () => void showToast({ message: decision === 'accept' ? 'Accepted. The plan follows the new doses.' : 'Declined. The doses stay as they are.' }),
    });
  };
  return (
    <Stack gap={12}>
      <div className="d-field">
        <label className="d-field-label" htmlFor={`answer-${proposal.id}`}>A word with your answer (optional)</label>
        <textarea id={`answer-${proposal.id}`} className="d-input" rows={2} maxLength={limits.noteLength} value={answer} onChange={(event) => setAnswer(event.target.value)} />
      </div>
      {decide.error ? <Notice tone="problem">{errorMessage(decide.error)}</Notice> : null}
      <Row>
        <Button kind="sun" label="Accept these doses" pending={decide.isPending} onPress={() => give('accept')} />
        <Button label="Decline" disabled={decide.isPending} onPress={() => give('decline')} />
      </Row>
    </Stack>
  );
}

function Withdraw({ yard, proposal }: { yard: YardResponse; proposal: ProposalResponse }): ReactElement {
  const withdraw = useWrite<ProposalResponse, void>(() => ({ method: 'POST', path: `/yards/${yard.id}/proposals/${proposal.id}/withdraw` }), { stale: [keys.yard(yard.id), keys.portfolio] });
  return (
    <Stack gap={8}>
      {withdraw.error ? <Notice tone="problem">{errorMessage(withdraw.error)}</Notice> : null}
      <Button label="Withdraw this proposal" pending={withdraw.isPending} onPress={() => withdraw.mutate(undefined)} />
    </Stack>
  );
}

import { useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead } from '@/components/data/useApi';
import { useYard } from '@/components/data/useYard';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { DataTable } from '@/components/ui/DataTable';
import { ErrorState } from '@/components/ui/ErrorState';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { addDays } from '@/scheduling/units/civilDay';
import type { EstablishmentResponse } from '@/shared/contracts/proposals';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatDepth } from '@/shared/display';
import { capital } from '@/shared/roundWords';
import { ProposalCard } from './ProposalCard';
import { ProposeForm } from './ProposeForm';
import { SeenStages } from './SeenStages';
import { StageCards } from './StageCards';
import { stageNames } from './stageNames';

/** A seeded zone: how far it is, its doses, and for a consultant the way to propose others. */
export function EstablishmentScreen({ yardId, zoneId }: { yardId: string; zoneId: string }): ReactElement {
  const yard = useYard(yardId);
  const seed = useRead<EstablishmentResponse>(keys.establishment(yardId, zoneId), `/yards/${yardId}/zones/${zoneId}/establishment`);
  const failed = yard.error ?? seed.error;
  if (failed) {
    return (
      <Screen title="Seeded zone">
        <ErrorState title="The sowing could not be loaded" detail={errorMessage(failed)} onRetry={() => void Promise.all([yard.refetch(), seed.refetch()])} retrying={seed.isFetching} />
      </Screen>
    );
  }
  if (!yard.data || !seed.data) {
    return <Screen title="Seeded zone"><Skeleton label="Loading the sowing" height={320} /></Screen>;
  }
  return <Establishment yard={yard.data} seed={seed.data} />;
}

function emergence(seed: EstablishmentResponse): string {
  const { emergenceFromOn, emergenceToOn } = seed.stageRange;
  if (emergenceFromOn === null || emergenceToOn === null) {
    return 'Too cold so far to say when it comes up.';
  }
  return `By soil temperature it comes up between ${formatCivilDay(emergenceFromOn, 'short')} and ${formatCivilDay(emergenceToOn, 'short')}; the field is slower than the laboratory.`;
}

function Establishment({ yard, seed }: { yard: YardResponse; seed: EstablishmentResponse }): ReactElement {
  const [proposing, setProposing] = useState(false);
  const todayOn = addDays(seed.seededOn, seed.dayNumber);
  const past = seed.days.filter((day) => day.on <= todayOn).reverse();
  const mayPropose = yard.abilities['proposal.write'] === true && seed.openProposal === null;
  return (
    <Screen title={`${seed.zoneName}, seeded`} headline={`${seed.zoneName}: ${stageNames[seed.stage].toLowerCase()}, day ${seed.dayNumber}.`} kicker={yard.name}>
      <div className="e-columns">
        <Stack gap={20}>
          <Card padding={20} gap={12}>
            <Tag label={`Sown ${formatCivilDay(seed.seededOn, 'short')}`} tone="seed" />
            <Text>{emergence(seed)}</Text>
            {seed.stageFrom === 'seen' && seed.seen[0] ? <Text>{`The stage is what ${seed.seen[0].person?.name ?? 'somebody'} saw on ${formatCivilDay(seed.seen[0].on, 'short')}.`}</Text> : null}
            <Text color="inkSoft">Before it has swelled, dry seed waits. Once it has sprouted, a dry afternoon kills: then doses matter most.</Text>
          </Card>
          <SeenStages yard={yard} seed={seed} todayOn={todayOn} />
          <Card padding={20} gap={12}>
            <Text variant="heading3" level={2}>{seed.scheduleIsDefault ? 'Doses by default' : 'Doses as agreed'}</Text>
            <StageCards schedule={seed.schedule} units={yard.units} currentStage={seed.stage} />
            {seed.scheduleIsDefault ? <Text variant="small">Defaults from extension advice: little and often until it is up, then fewer and deeper. Not measured here.</Text> : null}
            {mayPropose && !proposing ? <Button kind="sun" label="Propose other doses" onPress={() => setProposing(true)} /> : null}
          </Card>
          {proposing ? <Card padding={20}><ProposeForm yard={yard} seed={seed} onDone={() => setProposing(false)} /></Card> : null}
          {seed.openProposal ? <ProposalCard yard={yard} proposal={seed.openProposal} /> : null}
        </Stack>
        <Card padding={20} gap={12}>
          <Text variant="heading3" level={2}>Doses day by day</Text>
          <div className="e-days"><DataTable<EstablishmentResponse['days'][number]>
            caption={`Doses of ${seed.zoneName} by day`}
            rows={past}
            rowKey={(day) => day.on}
            empty={<Text color="inkSoft">No day has passed since sowing.</Text>}
            columns={[
              { header: 'Day', cell: (day) => (day.on === todayOn ? 'Today' : formatCivilDay(day.on, 'short')) },
              { header: 'Stage', cell: (day) => capital(stageNames[day.stage].toLowerCase()) },
              { header: 'Done', align: 'right', cell: (day) => (day.plannedDoses === 0 ? 'none planned' : `${day.doneDoses} of ${day.plannedDoses}${day.skippedDoses > 0 ? `, ${day.skippedDoses} skipped` : ''}`) },
              { header: 'Depth', align: 'right', cell: (day) => formatDepth(day.appliedMm, yard.units) },
            ]}
          /></div>
        </Card>
      </div>
    </Screen>
  );
}

import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { useYard } from '@/components/data/useYard';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { LinkButton } from '@/components/ui/LinkButton';
import { Row } from '@/components/ui/Row';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatArea } from '@/shared/display';
import { capital, counted } from '@/shared/roundWords';
import { EquipmentSection } from './EquipmentSection';
import { HoursSummary } from './HoursSummary';
import { PermitsSection } from './PermitsSection';
import { RulesSection } from './RulesSection';
import { ZoneSection } from './ZoneSection';

/** What the yard is made of: zones with their positions, tap, hoses and sprinklers, hours and rules. */
export function YardScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  if (yard.error && !yard.data) {
    return <Screen title="Yard"><ErrorState title="The yard could not be loaded" detail={errorMessage(yard.error)} onRetry={() => void yard.refetch()} retrying={yard.isFetching} /></Screen>;
  }
  return yard.data ? <Yard yard={yard.data} /> : <Screen title="Yard"><Skeleton label="Loading the yard" height={360} /></Screen>;
}

function headline(yard: YardResponse): string {
  if (yard.zones.length === 0) {
    return 'No zone yet';
  }
  const area = yard.zones.reduce((sum, zone) => sum + zone.areaM2, 0);
  return `${capital(counted(yard.zones.length, 'zone'))}, ${formatArea(area, yard.units)} of lawn.`;
}

function Yard({ yard }: { yard: YardResponse }): ReactElement {
  const edits = yard.abilities['facts.edit'] === true;
  return (
    <Screen title="Yard" headline={headline(yard)} kicker={`${yard.name} · ${yard.placeName}`}
      actions={(
        <Row gap={8}>
          <LinkButton label="Season" href={`/yards/${yard.id}/season` as Href} />
          {yard.abilities['yard.update'] ? <LinkButton label="Settings of this yard" href={`/yards/${yard.id}/settings` as Href} /> : null}
        </Row>
      )}>
      {yard.zones.length === 0 && edits ? (
        <EmptyState title="Nothing to water yet" action={<LinkButton kind="sun" label="Set up this yard" href={`/yards/${yard.id}/set-up` as Href} />}>
          A tap, a hose, a sprinkler and the size of one zone are enough for a first plan.
        </EmptyState>
      ) : null}
      <div className="w-columns">
        <Stack gap={20}>
          <ZoneSection yard={yard} />
        </Stack>
        <Stack gap={20}>
          <EquipmentSection yard={yard} />
          <HoursSummary yard={yard} />
          <RulesSection yard={yard} />
          <PermitsSection yard={yard} />
        </Stack>
      </div>
    </Screen>
  );
}

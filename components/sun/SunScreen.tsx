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
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { ZoneSunResponse } from '@/shared/contracts/ground';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatNumber } from '@/shared/display';
import { SunDiary } from './SunDiary';
import { SunMonths } from './SunMonths';
import { sunHeadline } from './sunWords';

/** How much sun a zone gets through the year, and the diary that tells it. */
export function SunScreen({ yardId, zoneId }: { yardId: string; zoneId: string }): ReactElement {
  const yard = useYard(yardId);
  const sun = useRead<ZoneSunResponse>(keys.zoneSun(yardId, zoneId), `/yards/${yardId}/zones/${zoneId}/sun`);
  const failed = yard.error ?? sun.error;
  if (failed) {
    return (
      <Screen title="Sun">
        <ErrorState title="The sun of the zone could not be loaded" detail={errorMessage(failed)} retrying={sun.isFetching} onRetry={() => void Promise.all([yard.refetch(), sun.refetch()])} />
      </Screen>
    );
  }
  if (!yard.data || !sun.data) {
    return <Screen title="Sun"><Skeleton label="Loading the sun of the zone" height={360} /></Screen>;
  }
  return <Sun yard={yard.data} sun={sun.data} />;
}

/** What the months rest on. */
function basis(sun: ZoneSunResponse, yard: YardResponse): string {
  if (sun.sunFrom === 'diary') {
    return 'By the sun diary: each unbroken time of shade is taken as one obstacle of even height, just tall enough. What nobody saw hide the sun counts as open.';
  }
  const zone = yard.zones.find((one) => one.id === sun.zoneId);
  const hours = zone ? `${formatNumber(zone.sunHours, 1).replace(/\.0$/, '')} hours of sun${zone.sunHoursOn === null ? '' : ` on ${formatCivilDay(zone.sunHoursOn, 'dated')}`}` : 'its hours of sun';
  return `By ${hours}, taken to lie around noon. A sun diary tells more: it knows morning from evening.`;
}

function Sun({ yard, sun }: { yard: YardResponse; sun: ZoneSunResponse }): ReactElement {
  const zone = yard.zones.find((one) => one.id === sun.zoneId);
  const isDefault = sun.sunFrom === 'hours' && (zone?.sunHoursIsDefault === true || zone?.sunHoursOnIsDefault === true);
  return (
    <Screen title={`Sun on ${sun.zoneName}`} headline={sunHeadline(sun)} kicker={<TextLink href={`/yards/${yard.id}/yard` as Href}>{yard.name}</TextLink>}>
      <div className="w-columns">
        <Card padding={20} gap={12}>
          <Text variant="heading3" level={2}>Month by month</Text>
          {isDefault ? <div><Tag label={zone?.sunHoursIsDefault ? 'Hours by default' : 'Day by default'} tone="shade" /></div> : null}
          <Text>{basis(sun, yard)}</Text>
          <SunMonths sun={sun} />
        </Card>
        <SunDiary yard={yard} sun={sun} />
      </div>
    </Screen>
  );
}

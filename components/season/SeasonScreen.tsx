import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead } from '@/components/data/useApi';
import { useYard } from '@/components/data/useYard';
import { Card } from '@/components/ui/Card';
import { ErrorState } from '@/components/ui/ErrorState';
import { Notice } from '@/components/ui/Notice';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { SeasonResponse } from '@/shared/contracts/season';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatRange, formatTemperature } from '@/shared/display';
import { capital } from '@/shared/roundWords';
import { grassWords } from '@/shared/zoneWords';
import { aboutWhen, freezeWords, preventerWords, seasonHeadline, windowWords, type GrassSeason } from './seasonWords';
import { YearBand } from './YearBand';

/** What the season holds for a yard: when to sow, when a weed preventer has its time, when it freezes. */
export function SeasonScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  const season = useRead<SeasonResponse>(keys.season(yardId), `/yards/${yardId}/season`);
  const failed = yard.error ?? season.error;
  if (failed) {
    return (
      <Screen title="Season">
        <ErrorState title="The season could not be told" detail={errorMessage(failed)} retrying={season.isFetching} onRetry={() => void Promise.all([yard.refetch(), season.refetch()])} />
      </Screen>
    );
  }
  if (!yard.data || !season.data) {
    return <Screen title="Season"><Skeleton label="Looking through past years" height={360} /></Screen>;
  }
  return <Season yard={yard.data} season={season.data} />;
}

function Season({ yard, season }: { yard: YardResponse; season: SeasonResponse }): ReactElement {
  const { freeze, preventer } = season;
  return (
    <Screen title="Season" headline={seasonHeadline(season)} kicker={yard.name}>
      <div className="w-columns">
        <Stack gap={20}>
          <Card padding={20} gap={12}>
            <Text variant="heading3" level={2}>The coming year</Text>
            <YearBand season={season} />
            <Text variant="small">{`The soil at 10 cm is about ${formatTemperature(season.soilC, yard.units)} today, ${season.soilIsKnown ? 'by the weather of the last days' : 'by the usual course of past years'}, give or take 2 to 3 °C (Zheng, Hunt, Running 1993).`}</Text>
          </Card>
          {alike(season).map((grasses) => <Sowing key={grasses[0]?.grass} season={season} grasses={grasses} yard={yard} />)}
        </Stack>
        <Stack gap={20}>
          <Card padding={20} gap={12}>
            <Text variant="heading3" level={2}>Weed preventer</Text>
            <Text>{preventerWords(season)}</Text>
            {preventer.lastsUntilOn === null ? null : <Text color="inkSoft">{`Put down then it works until ${aboutWhen(preventer.lastsUntilOn.least, season.today)} to ${aboutWhen(preventer.lastsUntilOn.most, season.today)}.`}</Text>}
            <Notice tone="caution">
              <Stack gap={4}>{preventer.cautions.map((caution) => <Text key={caution}>{caution}</Text>)}</Stack>
            </Notice>
            <Text variant="small">{`${preventer.sources.join('; ')}.`}</Text>
          </Card>
          <Card padding={20} gap={12}>
            <Text variant="heading3" level={2}>First freeze</Text>
            {season.nextFreezeOn === null ? null : <Notice tone="caution">{`The forecast has frost on ${formatCivilDay(season.nextFreezeOn, 'long')}. Take the hose off the tap, drain and coil it.`}</Notice>}
            <Text>{freezeWords(season)}</Text>
            {freeze === null ? null : <Text>{`Take the hose off by ${formatCivilDay(freeze.hoseOffBy, 'dated')}. A hose left on holds water in a frost-free tap, and the pipe bursts in the wall.`}</Text>}
            <Text variant="small">{`${season.source}, ${season.years} years.`}</Text>
          </Card>
        </Stack>
      </div>
    </Screen>
  );
}

/** Grasses of which the same is to be said, together. */
function alike({ grasses, today }: SeasonResponse): GrassSeason[][] {
  const said = (grass: GrassSeason) => JSON.stringify([[...grass.sowing, ...grass.germination].map((window) => windowWords(window, today)), grass.dormantFromOn, grass.leastSoilC, grass.mostSoilC]);
  const groups = new Map<string, GrassSeason[]>();
  for (const grass of grasses) groups.set(said(grass), [...(groups.get(said(grass)) ?? []), grass]);
  return [...groups.values()];
}

const listed = (names: readonly string[]) => (names.length < 2 ? names[0] ?? '' : `${names.slice(0, -1).join(', ')} and ${names[names.length - 1] ?? ''}`);

/** When to sow a grass, or several of which the same is to be said. */
function Sowing({ season, grasses, yard }: { season: SeasonResponse; grasses: readonly GrassSeason[]; yard: YardResponse }): ReactElement | null {
  const { today } = season;
  const grass = grasses[0];
  if (!grass) {
    return null;
  }
  const zones = grasses.flatMap((each) => each.zones);
  const [best, ...others] = grass.sowing;
  const wants = formatRange('temperature', grass.leastSoilC, grass.mostSoilC, yard.units);
  return (
    <Card padding={20} gap={12} tone="seed">
      <Text variant="heading3" level={2}>{`Seed: ${listed(grasses.map((each, index) => (index === 0 ? grassWords[each.grass] : grassWords[each.grass].toLowerCase())))}`}</Text>
      {zones.length > 0 ? <Text color="inkSoft">{zones.join(', ')}</Text> : null}
      <Text>{best ? `Overseed ${windowWords(best, today)}: it comes up and roots before ${best.season === 'before_heat' ? 'the heat' : best.season === 'before_winter' ? 'winter' : 'any rest'}.` : 'No time of the coming year leaves it enough weeks to root.'}</Text>
      {others.length > 0 ? <Text>{`Also ${others.slice(0, 2).map((window) => windowWords(window, today)).join(', and ')}.`}</Text> : null}
      <Text>{grass.germination.length === 0 ? `The soil does not reach the ${wants} in which its seed comes up.` : `Its seed comes up in soil of ${wants}: ${grass.germination.slice(0, 2).map((window) => windowWords(window, today)).join(', and ')}.`}</Text>
      {grass.dormantFromOn === null ? null : <Text>{`From ${aboutWhen(grass.dormantFromOn, today)} seed sleeps in the cold soil until spring.`}</Text>}
      <Text variant="small">{`${capital(grass.sources.join('; '))}.`}</Text>
    </Card>
  );
}

import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead } from '@/components/data/useApi';
import { useYard } from '@/components/data/useYard';
import { Card } from '@/components/ui/Card';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { LinkButton } from '@/components/ui/LinkButton';
import { Notice } from '@/components/ui/Notice';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { MonthFitResponse } from '@/shared/contracts/fit';
import type { YardResponse } from '@/shared/contracts/yards';
import { MonthBars } from './MonthBars';
import { MonthTable } from './MonthTable';
import { climateSentence, defaultsSentence, namesIn, remedyWords, yearHeadline, type FitNames } from './monthFitWords';

const title = 'Does the year fit?';

/** Hose-hours needed against had for every month of the coming year, and what would help. */
export function MonthFitScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  const fit = useRead<MonthFitResponse>(keys.fit(yardId), `/yards/${yardId}/fit`);
  const failed = yard.error ?? fit.error;
  if (failed) {
    return (
      <Screen title={title}>
        <ErrorState title="The year could not be weighed" detail={errorMessage(failed)} retrying={fit.isFetching || yard.isFetching} onRetry={() => void Promise.all([yard.refetch(), fit.refetch()])} />
      </Screen>
    );
  }
  if (!yard.data || !fit.data) {
    return <Screen title={title}><Skeleton label="Weighing the year" height={360} /></Screen>;
  }
  return <Year yard={yard.data} fit={fit.data} />;
}

function Year({ yard, fit }: { yard: YardResponse; fit: MonthFitResponse }): ReactElement {
  const mayEdit = yard.abilities['facts.edit'];
  if (yard.zones.length === 0 || yard.positions.length === 0) {
    return (
      <Screen title={title} headline="Nothing to weigh yet." kicker={yard.name}>
        <EmptyState title="The year begins with a zone and a position" action={mayEdit ? <LinkButton kind="sun" label="Set up this yard" href={`/yards/${yard.id}/set-up` as Href} /> : undefined}>
          The size of a zone, a tap and a sprinkler tell how many hours each month takes.
        </EmptyState>
      </Screen>
    );
  }
  const names: FitNames = {
    units: yard.units,
    tap: (id) => yard.taps.find((tap) => tap.id === id)?.name ?? 'the tap',
    zone: (id) => yard.zones.find((zone) => zone.id === id)?.name ?? 'a zone',
    flowLpm: (id) => yard.taps.find((tap) => tap.id === id)?.flowLpm ?? 0,
  };
  const taken = defaultsSentence(fit.defaults);
  return (
    <Screen title={title} headline={yearHeadline(fit)} kicker={yard.name}>
      <div className="fm-columns" data-alone={fit.remedies.length === 0 ? '' : undefined}>
        <div className="fm-main">
          <Card padding={20} gap={12}>
            <Text variant="heading3" level={2}>Hose-hours, month by month</Text>
            <MonthBars months={fit.months} tightestMonth={fit.tightestMonth} />
            <details className="w-details">
              <summary>The months in numbers</summary>
              <MonthTable months={fit.months} units={yard.units} />
            </details>
          </Card>
          {fit.leftOut.zoneIds.length > 0 ? (
            <Notice tone="info" title="Not counted">{`${namesIn(fit.leftOut.zoneIds.map((id) => names.zone(id)))} ${fit.leftOut.zoneIds.length === 1 ? 'has' : 'have'} no position yet, so no hours are counted there.`}</Notice>
          ) : null}
        </div>
        {fit.remedies.length === 0 || fit.tightestMonth === null ? null : (
          <div className="fm-rest">
            <Card padding={20} gap={16}>
              <Text variant="heading3" level={2}>What would help, each by itself</Text>
              <ol className="f-helps fm-remedies">
                {fit.remedies.map((remedy) => {
                  const words = remedyWords(remedy, fit.tightestMonth ?? '', names);
                  return (
                    <li key={JSON.stringify([remedy.kind, words.title])}>
                      <h3>{words.title}</h3>
                      <p>{words.text}</p>
                    </li>
                  );
                })}
              </ol>
            </Card>
          </div>
        )}
        <div className="fm-notes">
          <Stack gap={8}>
            {fit.climate.sample ? <Tag label="Sample weather" tone="shade" /> : null}
            {fit.climate.isEstimated ? <Tag label="Default climate" /> : null}
            <Text color="inkSoft">{climateSentence(fit.climate)}</Text>
            <Text color="inkSoft">{`Needed: each zone filled when it reaches its refill line, its moves, and the doses of new seed. Had: minutes when the water rules allow it and somebody is home, less the time to get ready.${taken === null ? '' : ` ${taken}`}`}</Text>
            {mayEdit ? (
              <div className="fm-links">
                <TextLink kind="standalone" href={`/yards/${yard.id}/hours` as Href}>Change the hours at home</TextLink>
                <TextLink kind="standalone" href={`/yards/${yard.id}/yard` as Href}>Change taps, hoses, zones and water rules</TextLink>
              </div>
            ) : null}
          </Stack>
        </div>
      </div>
    </Screen>
  );
}

import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead, useWrite } from '@/components/data/useApi';
import { useWishes } from '@/components/data/useWishes';
import { useYard } from '@/components/data/useYard';
import { Button } from '@/components/ui/Button';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { LinkButton } from '@/components/ui/LinkButton';
import { Notice } from '@/components/ui/Notice';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import { showToast } from '@/components/ui/Toast';
import type { Reason } from '@/scheduling/planning/types';
import type { PlanResponse } from '@/shared/contracts/plans';
import type { WishesResponse } from '@/shared/contracts/wishes';
import type { YardResponse } from '@/shared/contracts/yards';
import { dayWord, formatDepth, formatMinutes, formatVolume } from '@/shared/display';
import { instantText } from '@/shared/instantText';
import { reasonText } from '@/shared/reasons';
import { capital, counted } from '@/shared/roundWords';
import { PermitNote } from './PermitNote';
import { PlanDay } from './PlanDay';
import { VersionsCard } from './VersionsCard';
import { WhatIfCard } from './WhatIfCard';
import { WishesCard } from './WishesCard';

/** Ten days ahead: each set, and each zone without one, with its reasons. */
export function PlanScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  const plan = useRead<PlanResponse>(keys.plan(yardId), `/yards/${yardId}/plan`);
  const wishes = useWishes(yardId);
  const failed = yard.error ?? plan.error ?? wishes.error;
  if (failed) {
    return (
      <Screen title="Plan">
        <ErrorState title="The plan could not be loaded" detail={errorMessage(failed)} retrying={plan.isFetching || yard.isFetching || wishes.isFetching}
          onRetry={() => void Promise.all([yard.refetch(), plan.refetch(), wishes.refetch()])} />
      </Screen>
    );
  }
  if (!yard.data || !plan.data || !wishes.data) {
    return <Screen title="Plan"><Skeleton label="Loading the plan" height={360} /></Screen>;
  }
  return <Plan yard={yard.data} plan={plan.data} wishes={wishes.data} />;
}

function headline(plan: PlanResponse, yard: YardResponse): string {
  if (yard.zones.length === 0) {
    return 'No zone to plan for yet.';
  }
  const rounds = plan.days.reduce((sum, day) => sum + day.rounds.length, 0);
  const first = plan.days.find((day) => day.rounds.length > 0);
  if (!first) {
    return 'No water in the coming ten days.';
  }
  return `${capital(counted(rounds, 'outing'))} in ten days, the first ${dayWord(first.on, plan.fromOn)}.`;
}

function Plan({ yard, plan, wishes }: { yard: YardResponse; plan: PlanResponse; wishes: WishesResponse }): ReactElement {
  const again = useWrite<PlanResponse, void>(() => ({ method: 'POST', path: `/yards/${yard.id}/plan`, body: {} }), { stale: [keys.yard(yard.id)] });
  const when = (instant: string) => instantText(instant, yard.timeZone, yard.units);
  const recompute = () => {
    again.mutate(undefined, {
      onSuccess: () => void showToast({ message: 'The plan is made anew.' }),
      onError: (error) => void showToast({ message: errorMessage(error), tone: 'problem' }),
    });
  };
  return (
    <Screen title="Plan" headline={headline(plan, yard)} kicker={yard.name}
      actions={yard.abilities['plan.recompute'] && yard.zones.length > 0 ? (
        <>
          <div className="p-to-aside"><Button label="What if" accessibleLabel="What if: go to it" onPress={() => document.getElementById('what-if')?.scrollIntoView()} /></div>
          <Button label="Plan again now" pending={again.isPending} onPress={recompute} />
        </>
      ) : undefined}>
      {yard.zones.length === 0 ? (
        <EmptyState title="The plan begins with a zone" action={yard.abilities['facts.edit'] ? <LinkButton kind="sun" label="Set up this yard" href={`/yards/${yard.id}/set-up`} /> : undefined}>
          A tap, a sprinkler and the size of one zone give ten days with a reason for each.
        </EmptyState>
      ) : <Stack gap={20}>
        {plan.missing.length > 0 ? (
          <Notice tone="info" title="What the plan lacks">
            <Stack gap={4}>{plan.missing.map((reason, index) => <Text key={index}>{reasonText(reason as Reason, yard.units, plan.fromOn)}</Text>)}</Stack>
          </Notice>
        ) : null}
        <PermitNote plan={plan} yard={yard} />
        <Shortages plan={plan} yard={yard} shortages={plan.shortages.filter((shortage) => !isChosen(shortage))} tone="caution" title="Not everything fits" />
        <Shortages plan={plan} yard={yard} shortages={plan.shortages.filter(isChosen)} tone="info" title="A little dry by choice" />
        <div className="p-columns">
          <ol className="p-days">
            {plan.days.map((day) => <PlanDay key={day.on} day={day} yard={yard} todayOn={plan.fromOn} locks={wishes.locks} />)}
          </ol>
          <div className="p-aside" id="what-if">
            {yard.abilities['plan.recompute'] ? <WhatIfCard yard={yard} todayOn={plan.fromOn} /> : null}
            <WishesCard yard={yard} wishes={wishes} todayOn={plan.fromOn} />
            <VersionsCard yard={yard} todayOn={plan.fromOn} />
          </div>
        </div>
        <TextLink kind="standalone" href={`/yards/${yard.id}/fit` as Href}>Does the year fit? Month by month</TextLink>
        <Text variant="small">{`Version ${plan.version}, made ${when(plan.createdAt)}${plan.weatherAsOf === null ? ', without weather yet' : `, weather as of ${when(plan.weatherAsOf)}`}.`}</Text>
      </Stack>}
    </Screen>
  );
}

type Shortage = PlanResponse['shortages'][number];

/** Whether the hours would do, and what counts most in this yard leaves the zone a little dry. */
const isChosen = (shortage: Shortage): boolean => shortage.reasons.some((reason) => reason.code === 'waits_on_priority');

interface ShortagesProps {
  plan: PlanResponse;
  yard: YardResponse;
  shortages: readonly Shortage[];
  tone: 'caution' | 'info';
  title: string;
}

/** Wishes that found no water, by zone: the first with its numbers, the others behind a fold. */
function Shortages({ plan, yard, shortages: found, tone, title }: ShortagesProps): ReactElement | null {
  if (found.length === 0) {
    return null;
  }
  const byZone = new Map<string, Shortage[]>();
  for (const shortage of found) {
    byZone.set(shortage.zoneId, [...(byZone.get(shortage.zoneId) ?? []), shortage]);
  }
  const sentence = (shortage: Shortage) => `${capital(dayWord(shortage.on, plan.fromOn))}: ${formatDepth(shortage.shortMm, yard.units)} short, ${formatMinutes(shortage.shortMinutes)} of water or ${formatVolume(shortage.litres, yard.units)}. ${shortage.reasons.map((reason) => reasonText(reason as Reason, yard.units, plan.fromOn)).join(' ')}`;
  return (
    <Notice tone={tone} title={title}>
      <Stack gap={12}>
        {[...byZone].map(([zoneId, shortages]) => (
          <div key={zoneId} className="p-short">
            <Text variant="label">{`${yard.zones.find((zone) => zone.id === zoneId)?.name ?? 'A zone'}: ${counted(shortages.length, 'day')} of ten with less water than it wants`}</Text>
            <Text>{shortages[0] ? sentence(shortages[0]) : ''}</Text>
            {shortages.length > 1 ? (
              <details>
                <summary>The other days</summary>
                <ul>{shortages.slice(1).map((shortage) => <li key={shortage.on}>{sentence(shortage)}</li>)}</ul>
              </details>
            ) : null}
          </div>
        ))}
        {tone === 'caution' ? <TextLink kind="standalone" href={`/yards/${yard.id}/fit` as Href}>What would make it fit</TextLink> : null}
      </Stack>
    </Notice>
  );
}

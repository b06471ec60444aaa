import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead } from '@/components/data/useApi';
import { useYard } from '@/components/data/useYard';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { LinkButton } from '@/components/ui/LinkButton';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { morningDepletionMm } from '@/scheduling/budget/morningDepletion';
import type { ObservationListResponse } from '@/shared/contracts/ground';
import type { PlanResponse } from '@/shared/contracts/plans';
import type { BudgetResponse, WeatherResponse } from '@/shared/contracts/water';
import type { YardResponse } from '@/shared/contracts/yards';
import { capital, countWord } from '@/shared/roundWords';
import { CheckSoil } from './CheckSoil';
import { RainGauge } from './RainGauge';
import { WeatherTable } from './WeatherTable';
import { ZoneWater } from './ZoneWater';

/** How much water each zone's root zone holds: past weeks and the days ahead. */
export function WaterScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  const budget = useRead<BudgetResponse>(keys.budget(yardId), `/yards/${yardId}/budget`);
  const weather = useRead<WeatherResponse>(keys.weather(yardId), `/yards/${yardId}/weather`);
  // The curve of the days ahead follows the plan; without one it shows what happens if nobody waters.
  const plan = useRead<PlanResponse>(keys.plan(yardId), `/yards/${yardId}/plan`);
  const checks = useRead<ObservationListResponse>(keys.observations(yardId), `/yards/${yardId}/observations`);
  const failed = yard.error ?? budget.error;
  if (failed) {
    return (
      <Screen title="Water">
        <ErrorState title="The water budget could not be loaded" detail={errorMessage(failed)} retrying={budget.isFetching || yard.isFetching}
          onRetry={() => void Promise.all([yard.refetch(), budget.refetch()])} />
      </Screen>
    );
  }
  if (!yard.data || !budget.data) {
    return <Screen title="Water"><Skeleton label="Loading the water budget" height={360} /></Screen>;
  }
  return <Water yard={yard.data} budget={budget.data} weather={weather.data ?? null} plan={plan.data ?? null} checks={checks.data?.observations ?? []} />;
}

function headline(budget: BudgetResponse): string {
  const past = budget.zones.filter(({ days }) => days.some((day) => day.on === budget.today && morningDepletionMm(day) >= day.refillLineMm));
  if (budget.zones.length === 0) {
    return 'No zone yet';
  }
  if (past.length === 0) {
    return budget.zones.length === 1 ? 'The zone is above its refill line.' : 'Every zone is above its refill line.';
  }
  return past.length === 1 ? `${past[0]?.name ?? 'One zone'} is past its refill line.` : `${capital(countWord(past.length))} zones are past their refill line.`;
}

function Water({ yard, budget, weather, plan, checks }: {
  yard: YardResponse; budget: BudgetResponse; weather: WeatherResponse | null; plan: PlanResponse | null; checks: ObservationListResponse['observations'];
}): ReactElement {
  return (
    <Screen title="Water" headline={headline(budget)} kicker={yard.name}>
      {budget.zones.length === 0 ? (
        <EmptyState title="No zone yet" action={<LinkButton kind="sun" label="Set up this yard" href={`/yards/${yard.id}/set-up`} />}>
          With its first zone a yard gets a water budget, day by day.
        </EmptyState>
      ) : (
        <div className="w-columns">
          <Stack gap={20}>
            {budget.zones.map((zone) => <ZoneWater key={zone.zoneId} zone={zone} yard={yard} today={budget.today} plan={plan} checks={checks.filter((one) => one.zoneId === zone.zoneId)} />)}
          </Stack>
          <Stack gap={20}>
            <CheckSoil yard={yard} today={budget.today} observations={checks} />
            <RainGauge yard={yard} today={budget.today} />
            {weather ? <WeatherTable weather={weather} yard={yard} today={budget.today} /> : null}
            <Text variant="small">The root zone is the soil the roots reach. The refill line is the depletion at which the grass begins to want water; below it growth slows.</Text>
          </Stack>
        </div>
      )}
    </Screen>
  );
}

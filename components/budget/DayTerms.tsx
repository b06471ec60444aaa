import ChevronLeft from 'lucide-react-native/icons/chevron-left';
import ChevronRight from 'lucide-react-native/icons/chevron-right';
import { useState, type ReactElement } from 'react';
import { IconButton } from '@/components/ui/IconButton';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { TermList } from '@/components/ui/TermList';
import { Text } from '@/components/ui/Text';
import { explainZoneDay } from '@/scheduling/budget/explainZoneDay';
import type { UnitSystem } from '@/shared/contracts/common';
import type { ObservationResponse } from '@/shared/contracts/ground';
import type { BudgetDayResponse } from '@/shared/contracts/water';
import { dayTermWords } from '@/shared/dayTerms';
import { formatCivilDay, formatNumber } from '@/shared/display';
import { foundWords, rainWords } from './groundWords';

const checkWords = (seen: ObservationResponse) => `The ${foundWords(seen)}: that counts for ${formatNumber(seen.weight * 100, 0)} % of the difference.`;

/** One day of a zone term by term, with what is behind each number and what was assumed for it. */
export function DayTerms({ days, today, units, name, observations }: {
  days: readonly BudgetDayResponse[]; today: string; units: UnitSystem; name: string; observations: readonly ObservationResponse[];
}): ReactElement | null {
  const [chosenOn, setChosenOn] = useState(today);
  const found = days.findIndex((day) => day.on === chosenOn);
  const index = found < 0 ? days.length - 1 : found;
  const day = days[index];
  if (!day) {
    return null;
  }
  const go = (step: number) => setChosenOn(days[index + step]?.on ?? day.on);
  const seen = observations.find(({ on }) => on === day.on) ?? null;
  return (
    <Stack gap={12}>
      <Row justify="space-between" wrap={false}>
        <IconButton icon={ChevronLeft} label={`Earlier day of ${name}`} disabled={index === 0} onPress={() => go(-1)} />
        <div role="status"><Text variant="label">{`${formatCivilDay(day.on, 'long')}${day.isForecast && day.on > today ? ', forecast without sets' : ''}`}</Text></div>
        <IconButton icon={ChevronRight} label={`Later day of ${name}`} disabled={index === days.length - 1} onPress={() => go(1)} />
      </Row>
      <TermList terms={dayTermWords(explainZoneDay(day), day, units, { rainFrom: rainWords[day.rainSource], ...(seen ? { found: checkWords(seen) } : {}) })} />
    </Stack>
  );
}

import { zodResolver } from '@hookform/resolvers/zod';
import { useMemo, useState, type ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useWrite } from '@/components/data/useApi';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { CheckboxGroupField } from '@/components/ui/CheckboxGroupField';
import { DateField } from '@/components/ui/DateField';
import { Form } from '@/components/ui/Form';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import { daylight } from '@/scheduling/sun/daylight';
import { isCivilDay } from '@/scheduling/units/civilDay';
import { civilDaySchema } from '@/shared/contracts/common';
import type { ZoneSunResponse } from '@/shared/contracts/ground';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatClock } from '@/shared/display';
import { counted } from '@/shared/roundWords';
import { minutesAt } from '@/shared/time';
import { z } from '@/shared/zod';
import { daylightHoursOf } from './sunWords';

const schema = z.object({ on: civilDaySchema, hours: z.array(z.string()) });
type Values = z.infer<typeof schema>;

/** Ticks for the hours of one day in which the sun fell on the zone. */
export function SunDiary({ yard, sun }: { yard: YardResponse; sun: ZoneSunResponse }): ReactElement | null {
  const form = useForm<Values>({ resolver: zodResolver(schema), mode: 'onTouched', defaultValues: { on: sun.today, hours: [] } });
  const on = useWatch({ control: form.control, name: 'on' });
  const hours = useMemo(() => {
    if (!isCivilDay(on)) return daylightHoursOf(6 * 60, 20 * 60);
    const { sunriseAt, sunsetAt } = daylight({ latitudeDeg: yard.latitudeDeg, longitudeDeg: yard.longitudeDeg, on });
    return daylightHoursOf(sunriseAt === null ? null : minutesAt(sunriseAt, yard.timeZone), sunsetAt === null ? null : minutesAt(sunsetAt, yard.timeZone));
  }, [on, yard.latitudeDeg, yard.longitudeDeg, yard.timeZone]);
  const path = (day: string) => `/yards/${yard.id}/zones/${sun.zoneId}/sun-diary/${day}`;
  const stale = [keys.yard(yard.id)];
  const save = useWrite<ZoneSunResponse, { on: string; sunnyHours: number[] }>(({ on: day, sunnyHours }) => ({ method: 'PUT', path: path(day), body: { sunnyHours } }), { stale });
  const remove = useWrite<ZoneSunResponse, string>((day) => ({ method: 'DELETE', path: path(day) }), { stale });
  const [problem, setProblem] = useState<string>();
  if (!yard.abilities['tests.record']) {
    return null;
  }
  const onSubmit = async (values: Values) => {
    setProblem(undefined);
    try {
      // Ticks of hours that the day does not have are left over from another date.
      await save.mutateAsync({ on: values.on, sunnyHours: values.hours.map(Number).filter((hour) => hours.includes(hour)) });
      form.reset({ on: values.on, hours: [] });
      void showToast({ message: 'Written down. The light of every month follows from it.' });
    } catch (error) {
      setProblem(showServerProblems(form, error, { sunnyHours: 'hours' }));
    }
  };
  const onRemove = async (day: string) => {
    setProblem(undefined);
    try {
      await remove.mutateAsync(day);
    } catch (error) {
      setProblem(errorMessage(error));
    }
  };
  const clock = (hour: number) => formatClock(hour * 60, yard.units).replace(':00', '');
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>Sun diary</Text>
      <Text color="inkSoft">On one sunny day, look at the zone each hour and tick the hours in which most of it lay in the sun. One day tells much; one in each season tells all.</Text>
      <Form form={form} onSubmit={onSubmit} submitLabel="Write this day down" problem={problem} label="Sun diary">
        <DateField control={form.control} name="on" label="Day" max={sun.today} />
        <CheckboxGroupField control={form.control} name="hours" label="In the sun from" look="segments" options={hours.map((hour) => ({ value: String(hour), label: clock(hour) }))} />
      </Form>
      {sun.pages.length > 0 ? (
        <Stack gap={4}>
          {sun.pages.map((page) => (
            <Row key={page.on} justify="space-between" gap={8} wrap={false}>
              <Text variant="small">{`${formatCivilDay(page.on, 'dated')}: ${page.sunnyHours.length === 0 ? 'no sun' : `${counted(page.sunnyHours.length, 'hour')} of sun, from ${page.sunnyHours.map(clock).join(', ')}`}`}</Text>
              <span className="d-nowrap"><Button size="small" kind="plain" label="Take out" accessibleLabel={`Take out ${formatCivilDay(page.on, 'dated')}`} onPress={() => void onRemove(page.on)} /></span>
            </Row>
          ))}
        </Stack>
      ) : null}
    </Card>
  );
}

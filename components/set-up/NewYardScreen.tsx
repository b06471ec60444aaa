import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter, type Href } from 'expo-router';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { keys } from '@/components/data/keys';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useWrite } from '@/components/data/useApi';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { Form } from '@/components/ui/Form';
import { Screen } from '@/components/ui/Screen';
import { TextField } from '@/components/ui/TextField';
import { nameSchema, unitSystemSchema, type UnitSystem } from '@/shared/contracts/common';
import type { Place } from '@/shared/contracts/places';
import type { CreateYardRequest, YardResponse } from '@/shared/contracts/yards';
import { z } from '@/shared/zod';
import { PlaceField, placeLabel } from './PlaceField';

const formSchema = z.object({ name: nameSchema, units: unitSystemSchema });
const unitOptions: { value: UnitSystem; label: string }[] = [{ value: 'us', label: 'Inches, feet, gallons' }, { value: 'metric', label: 'Millimetres, metres, litres' }];

/** First step: what the yard is called and where it lies. */
export function NewYardScreen(): ReactElement {
  const router = useRouter();
  const form = useForm({ resolver: zodResolver(formSchema), mode: 'onTouched', defaultValues: { name: '', units: 'us' as UnitSystem } });
  const [place, setPlace] = useState<Place | null>(null);
  const [placeError, setPlaceError] = useState<string>();
  const [problem, setProblem] = useState<string>();
  const create = useWrite<YardResponse, CreateYardRequest>((body) => ({ method: 'POST', path: '/yards', body }), { stale: [keys.yards, keys.portfolio] });
  const onSubmit = async (values: { name: string; units: UnitSystem }) => {
    setProblem(undefined);
    if (place === null) {
      setPlaceError('Choose a place from the list.');
      return;
    }
    try {
      const yard = await create.mutateAsync({
        ...values, placeName: placeLabel(place).slice(0, 80), latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, timeZone: place.timeZone,
      });
      router.replace(`/yards/${yard.id}/set-up` as Href);
    } catch (error) {
      setProblem(showServerProblems(form, error));
    }
  };
  return (
    <Screen title="New yard" headline="Where is the yard?" kicker="Step 1 of 2" width="form">
      <Form form={form} onSubmit={onSubmit} submitLabel="Go on to tap and lawn" submitKind="sun" problem={problem}>
        <TextField control={form.control} name="name" label="What to call it" hint="The street, or “Home”." />
        <PlaceField chosen={place} error={placeError} onChoose={(next) => {
          setPlace(next);
          setPlaceError(undefined);
        }} />
        <ChoiceField control={form.control} name="units" label="Units" look="segments" options={unitOptions} />
      </Form>
    </Screen>
  );
}

import { zodResolver } from '@hookform/resolvers/zod';
import type { ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { CheckboxField } from '@/components/ui/CheckboxField';
import { NumberField } from '@/components/ui/NumberField';
import { numberText, optionalNumberText } from '@/components/ui/numberText';
import { SelectField } from '@/components/ui/SelectField';
import { TextField } from '@/components/ui/TextField';
import { nameSchema, type UnitSystem } from '@/shared/contracts/common';
import { sprinklerKinds, type HoseResponse, type SprinklerKind, type SprinklerResponse, type TapResponse } from '@/shared/contracts/equipment';
import type { YardResponse } from '@/shared/contracts/yards';
import { fromShown, toShown, unitLabel, type Quantity } from '@/shared/display';
import { limits } from '@/shared/limits';
import { fieldText } from '@/shared/parseQuantity';
import { z } from '@/shared/zod';
import { sprinklerKindWords } from '@/shared/zoneWords';
import { FactDialog } from './FactDialog';

/** Smallest and largest value of a quantity in the unit of the field, from its SI limits. */
function within(quantity: Quantity, minSi: number, maxSi: number, units: UnitSystem) {
  const tidy = (value: number) => Number(value.toPrecision(3));
  return { min: tidy(toShown(quantity, minSi, units)), max: tidy(toShown(quantity, maxSi, units)), unit: unitLabel(quantity, units) };
}

const inUse = 'Only what no position uses can be removed.';

/** Adds or changes a tap. A flow left empty stays as it is: the default, or what the last bucket test gave. */
export function TapDialog({ yard, tap, onClose }: { yard: YardResponse; tap: TapResponse | null; onClose: () => void }): ReactElement {
  const schema = z.object({ name: nameSchema, flow: optionalNumberText(within('flow', limits.flowMinLpm, limits.flowMaxLpm, yard.units)), shutOffTimer: z.boolean() });
  type Values = z.output<typeof schema>;
  const form = useForm<z.input<typeof schema>, unknown, Values>({
    resolver: zodResolver(schema), mode: 'onTouched',
    defaultValues: { name: tap?.name ?? '', flow: '', shutOffTimer: tap?.shutOffTimer ?? false },
  });
  return (
    <FactDialog yardId={yard.id} path="taps" id={tap?.id ?? null} title={tap ? tap.name : 'A new tap'} saveLabel="Save the tap" form={form} names={{ flowLpm: 'flow' }} onClose={onClose}
      removal={{ label: 'Remove this tap', body: inUse }}
      toBody={(values) => ({ name: values.name, shutOffTimer: values.shutOffTimer, ...(values.flow === null ? {} : { flowLpm: fromShown('flow', values.flow, yard.units) }) })}>
      <TextField control={form.control} name="name" label="Name" />
      <NumberField control={form.control} name="flow" label="Flow, if you know it" unit={unitLabel('flow', yard.units)} optional hint="A bucket test is better: it takes a minute." />
      <CheckboxField control={form.control} name="shutOffTimer" label="Has a shut-off timer" hint="Then somebody must be at home for the start of a set, not for its end." />
    </FactDialog>
  );
}

/** Adds or changes a hose. */
export function HoseDialog({ yard, hose, onClose }: { yard: YardResponse; hose: HoseResponse | null; onClose: () => void }): ReactElement {
  const schema = z.object({
    name: nameSchema, length: numberText(within('length', 1, limits.hoseLengthMaxM, yard.units)), bore: numberText(within('bore', limits.hoseBoreMinMm, limits.hoseBoreMaxMm, yard.units)),
  });
  type Values = z.output<typeof schema>;
  const form = useForm<z.input<typeof schema>, unknown, Values>({
    resolver: zodResolver(schema), mode: 'onTouched',
    defaultValues: { name: hose?.name ?? '', length: fieldText('length', hose?.lengthM, yard.units), bore: fieldText('bore', hose?.boreMm ?? 15.875, yard.units) },
  });
  return (
    <FactDialog yardId={yard.id} path="hoses" id={hose?.id ?? null} title={hose ? hose.name : 'A new hose'} saveLabel="Save the hose" form={form} names={{ lengthM: 'length', boreMm: 'bore' }} onClose={onClose}
      removal={{ label: 'Remove this hose', body: inUse }}
      toBody={(values) => ({ name: values.name, lengthM: fromShown('length', values.length, yard.units), boreMm: fromShown('bore', values.bore, yard.units) })}>
      <TextField control={form.control} name="name" label="Name" />
      <NumberField control={form.control} name="length" label="Length" unit={unitLabel('length', yard.units)} />
      <NumberField control={form.control} name="bore" label="Inside width" unit={unitLabel('bore', yard.units)} hint="It is printed on the hose. A wider hose carries far more water to the end." />
    </FactDialog>
  );
}

/** Adds or changes a sprinkler. */
export function SprinklerDialog({ yard, sprinkler, onClose }: { yard: YardResponse; sprinkler: SprinklerResponse | null; onClose: () => void }): ReactElement {
  const schema = z.object({ name: nameSchema, kind: z.enum(sprinklerKinds) });
  type Values = { name: string; kind: SprinklerKind };
  const form = useForm<Values, unknown, Values>({ resolver: zodResolver(schema), mode: 'onTouched', defaultValues: { name: sprinkler?.name ?? '', kind: sprinkler?.kind ?? 'oscillating' } });
  return (
    <FactDialog yardId={yard.id} path="sprinklers" id={sprinkler?.id ?? null} title={sprinkler ? sprinkler.name : 'A new sprinkler'} saveLabel="Save the sprinkler" form={form} onClose={onClose}
      removal={{ label: 'Remove this sprinkler', body: inUse }} toBody={(values) => values}>
      <TextField control={form.control} name="name" label="Name" hint="So that you know it in the garage: the green one." />
      <SelectField control={form.control} name="kind" label="Kind" options={sprinklerKinds.map((kind) => ({ value: kind, label: sprinklerKindWords[kind] }))} />
    </FactDialog>
  );
}

import { zodResolver } from '@hookform/resolvers/zod';
import type { ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { Dialog } from '@/components/ui/Dialog';
import { NumberField } from '@/components/ui/NumberField';
import { optionalNumberText } from '@/components/ui/numberText';
import { SelectField } from '@/components/ui/SelectField';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import { nameSchema, noteSchema, type UnitSystem } from '@/shared/contracts/common';
import type { PositionResponse } from '@/shared/contracts/equipment';
import type { YardResponse } from '@/shared/contracts/yards';
import { fromShown, toShown, unitLabel } from '@/shared/display';
import { limits } from '@/shared/limits';
import { fieldText } from '@/shared/parseQuantity';
import { z } from '@/shared/zod';
import { FactDialog } from './FactDialog';

function positionSchema(units: UnitSystem) {
  return z.object({
    name: nameSchema, mark: noteSchema, tapId: z.string().min(1, 'Choose a tap.'), hoseId: z.string(), sprinklerId: z.string().min(1, 'Choose a sprinkler.'),
    wettedArea: optionalNumberText({ min: 1, max: Math.floor(toShown('area', limits.areaMaxM2, units)), unit: unitLabel('area', units) }),
  });
}
type PositionText = z.input<ReturnType<typeof positionSchema>>;
type PositionValues = z.output<ReturnType<typeof positionSchema>>;

/** Marks a position for a sprinkler, or changes one. */
export function PositionDialog({ yard, zoneId, position, onClose }: { yard: YardResponse; zoneId: string; position: PositionResponse | null; onClose: () => void }): ReactElement {
  const { units } = yard;
  const form = useForm<PositionText, unknown, PositionValues>({
    resolver: zodResolver(positionSchema(units)), mode: 'onTouched',
    defaultValues: {
      name: position?.name ?? '', mark: position?.mark ?? '', tapId: position?.tapId ?? yard.taps[0]?.id ?? '', hoseId: position ? position.hoseId ?? '' : yard.hoses[0]?.id ?? '',
      sprinklerId: position?.sprinklerId ?? yard.sprinklers[0]?.id ?? '', wettedArea: position && !position.wettedAreaIsDefault ? fieldText('area', position.wettedAreaM2, units) : '',
    },
  });
  if (yard.taps.length === 0 || yard.sprinklers.length === 0) {
    return <Dialog open onClose={onClose} title="First a tap and a sprinkler"><Text>A position is a marked spot for a sprinkler that a tap feeds. Add both under “Tap, hose, sprinkler”.</Text></Dialog>;
  }
  const toBody = (values: PositionValues) => ({
    name: values.name, mark: values.mark, tapId: values.tapId, hoseId: values.hoseId === '' ? null : values.hoseId, sprinklerId: values.sprinklerId,
    ...(position === null ? { zoneId, ...(values.wettedArea === null ? {} : { wettedAreaM2: fromShown('area', values.wettedArea, units) }) }
      : { wettedAreaM2: values.wettedArea === null ? null : fromShown('area', values.wettedArea, units) }),
  });
  return (
    <FactDialog yardId={yard.id} path="positions" id={position?.id ?? null} title={position ? position.name : 'A new position'} saveLabel="Save the position" form={form} toBody={toBody} onClose={onClose}
      names={{ wettedAreaM2: 'wettedArea' }} removal={{ label: 'Remove this position', body: 'It leaves the plan. Its tests and rounds stay in the history.' }}>
      <TextField control={form.control} name="name" label="Name" hint="By the maple, shed side." />
      <TextField control={form.control} name="mark" label="How to find the spot again" lines={2} optional hint="Distances from two things that do not move, and which way the sprinkler faces." />
      <SelectField control={form.control} name="tapId" label="Tap" options={yard.taps.map((tap) => ({ value: tap.id, label: tap.name }))} />
      <SelectField control={form.control} name="hoseId" label="Hose" options={[{ value: '', label: 'Not said' }, ...yard.hoses.map((hose) => ({ value: hose.id, label: hose.name }))]} />
      <SelectField control={form.control} name="sprinklerId" label="Sprinkler" hint="Another hose or sprinkler ends the position’s catch-cup test." options={yard.sprinklers.map((sprinkler) => ({ value: sprinkler.id, label: sprinkler.name }))} />
      <NumberField control={form.control} name="wettedArea" label="Area it wets" unit={unitLabel('area', units)} optional hint="Empty shares the zone evenly among its positions." />
    </FactDialog>
  );
}

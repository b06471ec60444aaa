import { zodResolver } from '@hookform/resolvers/zod';
import type { ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { CheckboxField } from '@/components/ui/CheckboxField';
import { Dialog } from '@/components/ui/Dialog';
import { Notice } from '@/components/ui/Notice';
import { NumberField } from '@/components/ui/NumberField';
import { numberText, optionalNumberText } from '@/components/ui/numberText';
import { SelectField } from '@/components/ui/SelectField';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import { nameSchema, noteSchema, type UnitSystem } from '@/shared/contracts/common';
import { guardedGrounds, type PositionResponse } from '@/shared/contracts/equipment';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatDepth, fromShown, toShown, unitLabel } from '@/shared/display';
import { limits } from '@/shared/limits';
import { fieldText } from '@/shared/parseQuantity';
import { z } from '@/shared/zod';
import { FactDialog } from './FactDialog';
import { guardedGroundCautions, guardedGroundWords } from './yardWords';

function weeklyDepthText(units: UnitSystem) {
  return numberText({ min: 0, max: Number(toShown('depth', limits.weeklyLimitMaxMm, units).toPrecision(2)), unit: unitLabel('depth', units) });
}

function positionSchema(units: UnitSystem) {
  return z.object({
    name: nameSchema, mark: noteSchema, tapId: z.string().min(1, 'Choose a tap.'), hoseId: z.string(), sprinklerId: z.string().min(1, 'Choose a sprinkler.'),
    wettedArea: optionalNumberText({ min: 1, max: Math.floor(toShown('area', limits.areaMaxM2, units)), unit: unitLabel('area', units) }),
    height: optionalNumberText({ min: 0, max: Math.floor(toShown('length', limits.positionHeightMaxM, units)), unit: unitLabel('length', units) }),
    over: z.enum(['none', ...guardedGrounds]), weeklyDepth: z.string(), weeklySource: z.string(), alternateSets: z.boolean(),
  }).superRefine((values, issue) => {
    if (values.over === 'none') {
      return;
    }
    const depth = weeklyDepthText(units).safeParse(values.weeklyDepth);
    if (!depth.success) {
      issue.addIssue({ code: 'custom', path: ['weeklyDepth'], message: depth.error.issues[0]?.message ?? 'Give a depth.' });
    }
    if (values.weeklySource.trim() === '' || !noteSchema.safeParse(values.weeklySource).success) {
      issue.addIssue({ code: 'custom', path: ['weeklySource'], message: 'Say who gave the limit, or where it is written.' });
    }
  });
}
const guardedGroundOptions = [{ value: 'none', label: 'None that is known' }, ...guardedGrounds.map((ground) => ({ value: ground, label: guardedGroundWords[ground] }))];

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
      height: position?.heightM == null ? '' : fieldText('length', position.heightM, units), alternateSets: position?.alternateSets ?? false,
      over: position?.weeklyLimit?.over ?? 'none', weeklyDepth: position?.weeklyLimit ? fieldText('depth', position.weeklyLimit.depthMm, units) : '', weeklySource: position?.weeklyLimit?.source ?? '',
    },
  });
  const over = useWatch({ control: form.control, name: 'over' });
  if (yard.taps.length === 0 || yard.sprinklers.length === 0) {
    return <Dialog open onClose={onClose} title="First a tap and a sprinkler"><Text>A position is a marked spot for a sprinkler that a tap feeds. Add both under “Tap, hose, sprinkler”.</Text></Dialog>;
  }
  const limit = position?.weeklyLimit ?? null;
  // An untouched depth keeps every place of its number.
  const limitMm = (text: string): number => (limit !== null && text === fieldText('depth', limit.depthMm, units) ? limit.depthMm : fromShown('depth', weeklyDepthText(units).parse(text), units));
  const toBody = (values: PositionValues) => ({
    name: values.name, mark: values.mark, tapId: values.tapId, hoseId: values.hoseId === '' ? null : values.hoseId, sprinklerId: values.sprinklerId,
    heightM: values.height === null ? null : fromShown('length', values.height, units), alternateSets: values.alternateSets,
    weeklyLimit: values.over === 'none' ? null : { over: values.over, depthMm: limitMm(values.weeklyDepth), source: values.weeklySource },
    ...(position === null ? { zoneId, ...(values.wettedArea === null ? {} : { wettedAreaM2: fromShown('area', values.wettedArea, units) }) }
      : { wettedAreaM2: values.wettedArea === null ? null : fromShown('area', values.wettedArea, units) }),
  });
  return (
    <FactDialog yardId={yard.id} path="positions" id={position?.id ?? null} title={position ? position.name : 'A new position'} saveLabel="Save the position" form={form} toBody={toBody} onClose={onClose}
      names={{ wettedAreaM2: 'wettedArea', heightM: 'height', 'weeklyLimit.depthMm': 'weeklyDepth', 'weeklyLimit.source': 'weeklySource' }} removal={{ label: 'Remove this position', body: 'It leaves the plan. Its tests and rounds stay in the history.' }}>
      <TextField control={form.control} name="name" label="Name" hint="By the maple, shed side." />
      <TextField control={form.control} name="mark" label="How to find the spot again" lines={2} optional hint="Distances from two things that do not move, and which way the sprinkler faces." />
      <SelectField control={form.control} name="tapId" label="Tap" options={yard.taps.map((tap) => ({ value: tap.id, label: tap.name }))} />
      <SelectField control={form.control} name="hoseId" label="Hose" options={[{ value: '', label: 'Not said' }, ...yard.hoses.map((hose) => ({ value: hose.id, label: hose.name }))]} />
      <SelectField control={form.control} name="sprinklerId" label="Sprinkler" hint="Another hose or sprinkler ends the position’s catch-cup test." options={yard.sprinklers.map((sprinkler) => ({ value: sprinkler.id, label: sprinkler.name }))} />
      <NumberField control={form.control} name="wettedArea" label="Area it wets" unit={unitLabel('area', units)} optional hint="Empty shares the zone evenly among its positions." />
      <CheckboxField control={form.control} name="alternateSets" label="Alternate sets" hint="This time on the marks, next time half-way between them: it evens the pattern and costs nothing." />
      <NumberField control={form.control} name="height" label="Height above the lowest position" unit={unitLabel('length', units)} optional hint="On a slope the highest is watered first, so that the hose is dragged downhill." />
      <SelectField control={form.control} name="over" label="Ground that takes only so much" options={guardedGroundOptions} />
      {over === 'none' ? null : (
        <>
          <NumberField control={form.control} name="weeklyDepth" label="At most in any seven days" unit={unitLabel('depth', units)} hint={`0 keeps the sprinkler off. One health district allows at most ${formatDepth(25.4, units)} a week in summer over a drain field.`} />
          <TextField control={form.control} name="weeklySource" label="Who says so" hint="Health office, septic installer, well contractor, and when." />
          <Notice tone="caution">{guardedGroundCautions[over]}</Notice>
        </>
      )}
    </FactDialog>
  );
}

import { zodResolver } from '@hookform/resolvers/zod';
import type { ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { serverNow } from '@/components/data/now';
import { CheckboxField } from '@/components/ui/CheckboxField';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { DateField } from '@/components/ui/DateField';
import { NumberField } from '@/components/ui/NumberField';
import { Notice } from '@/components/ui/Notice';
import { numberText, optionalNumberText } from '@/components/ui/numberText';
import { Row } from '@/components/ui/Row';
import { SelectField } from '@/components/ui/SelectField';
import { TextField } from '@/components/ui/TextField';
import { isCivilDay } from '@/scheduling/units/civilDay';
import { nameSchema, type UnitSystem } from '@/shared/contracts/common';
import type { YardResponse } from '@/shared/contracts/yards';
import { grassIds, mulches, soilCompactions, soilTextures, type GrassId, type Mulch, type SoilCompaction, type SoilTexture, type ZoneResponse } from '@/shared/contracts/zones';
import { formatCivilDay, fromShown, toShown, unitLabel } from '@/shared/display';
import { limits } from '@/shared/limits';
import { civilDayAt } from '@/shared/time';
import { fieldText } from '@/shared/parseQuantity';
import { z } from '@/shared/zod';
import { compactionWords, grassWords, soilWords } from '@/shared/zoneWords';
import { FactDialog } from './FactDialog';
import { coverWords, mulchWords, ownOption, shareWords, treeRootWords } from './yardWords';

/** An empty choice keeps, or returns to, the default. */
const byDefault = '';

function zoneSchema(units: UnitSystem) {
  const areaMax = Math.floor(toShown('area', limits.areaMaxM2, units));
  return z.object({
    name: nameSchema, area: numberText({ min: 1, max: areaMax, unit: unitLabel('area', units) }),
    grass: z.string(), soil: z.string(), slope: optionalNumberText({ min: 0, max: 60, unit: '%' }), sunHours: optionalNumberText({ min: 0, max: 24, unit: 'h' }), sunHoursOn: z.string(),
    compaction: z.string(), treeRoots: z.string(), cover: z.string(),
    state: z.enum(['established', 'seeded']), seededOn: z.string(), mulch: z.enum(mulches), resting: z.boolean(), priority: numberText({ min: 1, max: 1000, whole: true }),
  }).superRefine((values, issue) => {
    if (values.sunHoursOn !== '' && !isCivilDay(values.sunHoursOn)) {
      issue.addIssue({ code: 'custom', path: ['sunHoursOn'], message: 'Give a day of the calendar.' });
    }
    if (values.state === 'seeded' && !isCivilDay(values.seededOn)) {
      issue.addIssue({ code: 'custom', path: ['seededOn'], message: 'Give the day it was sown.' });
    }
  });
}
type ZoneText = z.input<ReturnType<typeof zoneSchema>>;
type ZoneValues = z.output<ReturnType<typeof zoneSchema>>;

/** Adds a zone or changes one. */
export function ZoneDialog({ yard, zone, onClose }: { yard: YardResponse; zone: ZoneResponse | null; onClose: () => void }): ReactElement {
  const { units } = yard;
  const today = civilDayAt(serverNow(), yard.timeZone);
  const form = useForm<ZoneText, unknown, ZoneValues>({
    resolver: zodResolver(zoneSchema(units)), mode: 'onTouched',
    defaultValues: {
      name: zone?.name ?? '', area: fieldText('area', zone?.areaM2, units), grass: zone && !zone.grassIsDefault ? zone.grass : byDefault, soil: zone && !zone.soilIsDefault ? zone.soil : byDefault,
      slope: zone && !zone.slopeIsDefault ? String(zone.slopePct) : '', sunHours: zone && !zone.sunHoursIsDefault ? String(zone.sunHours) : '',
      sunHoursOn: zone && !zone.sunHoursOnIsDefault ? zone.sunHoursOn ?? '' : '', compaction: zone && !zone.compactionIsDefault ? zone.compaction : byDefault,
      treeRoots: zone && !zone.treeRootShareIsDefault ? String(zone.treeRootShare) : byDefault, cover: zone && !zone.coverFractionIsDefault ? String(zone.coverFraction) : byDefault,
      state: zone?.seededOn ? 'seeded' : 'established', seededOn: zone?.seededOn ?? '', mulch: zone?.mulch ?? 'none', resting: zone?.resting ?? false, priority: String(zone?.priority ?? 100),
    },
  });
  const state = useWatch({ control: form.control, name: 'state' });
  const toBody = (values: ZoneValues) => {
    // A value left empty is a default: null returns to it, and for a new zone it is left out.
    const or = <V,>(value: V | null) => (value === null && zone === null ? undefined : value);
    const areaChanged = zone === null || form.formState.dirtyFields.area === true;
    return {
      name: values.name, ...(areaChanged ? { areaM2: fromShown('area', values.area, units), ...(zone === null ? {} : { sideAM: null, sideBM: null }) } : {}),
      grass: or(values.grass === byDefault ? null : (values.grass as GrassId)), soil: or(values.soil === byDefault ? null : (values.soil as SoilTexture)),
      slopePct: or(values.slope), sunHours: or(values.sunHours), sunHoursOn: or(values.sunHoursOn === '' ? null : values.sunHoursOn),
      compaction: or(values.compaction === byDefault ? null : (values.compaction as SoilCompaction)), treeRootShare: or(values.treeRoots === byDefault ? null : Number(values.treeRoots)),
      coverFraction: or(values.cover === byDefault ? null : Number(values.cover)), seededOn: values.state === 'seeded' ? values.seededOn : null, mulch: values.mulch, resting: values.resting, priority: values.priority,
    };
  };
  const asDefault = (words: string) => ({ value: byDefault, label: zone ? `Default (${words})` : 'Default for the place' });
  return (
    <FactDialog yardId={yard.id} path="zones" id={zone?.id ?? null} title={zone ? zone.name : 'A new zone'} saveLabel="Save the zone" form={form} toBody={toBody} onClose={onClose}
      names={{ areaM2: 'area', slopePct: 'slope', treeRootShare: 'treeRoots', coverFraction: 'cover' }} removal={{ label: 'Remove this zone', body: 'It leaves the plan, with its positions. Its water budget and history stay.' }}>
      <TextField control={form.control} name="name" label="Name" />
      <NumberField control={form.control} name="area" label="Area" unit={unitLabel('area', units)} />
      <SelectField control={form.control} name="grass" label="Grass" options={[asDefault(zone ? grassWords[zone.grass] : ''), ...grassIds.map((id) => ({ value: id, label: grassWords[id] }))]} />
      <SelectField control={form.control} name="soil" label="Soil" hint="Rub it wet between finger and thumb: gritty is sand, floury is silt, sticky is clay." options={[asDefault(zone ? soilWords[zone.soil] : ''), ...soilTextures.map((id) => ({ value: id, label: soilWords[id] }))]} />
      {zone?.hasSunDiary ? <Notice>This zone has a sun diary: its light in every month comes from there, not from the hours below.</Notice> : null}
      <Row gap={12} align="flex-start">
        <NumberField control={form.control} name="sunHours" label="Hours of direct sun" unit="h" optional hint="On a clear day. Empty takes the default." />
        <DateField control={form.control} name="sunHoursOn" label="Seen on" optional max={today} hint={zone && zone.sunHoursOn !== null && zone.sunHoursOnIsDefault ? `Default: ${formatCivilDay(zone.sunHoursOn, 'dated')}` : 'Empty takes today.'} />
      </Row>
      <NumberField control={form.control} name="slope" label="Slope" unit="%" optional />
      <SelectField control={form.control} name="compaction" label="The ground underfoot" options={[asDefault(zone ? compactionWords[zone.compaction].toLowerCase() : ''), ...soilCompactions.map((id) => ({ value: id, label: compactionWords[id] }))]} />
      <SelectField control={form.control} name="treeRoots" label="Tree roots in the lawn" hint="Roots reach at least as far as the crown; they drink from the lawn’s water." options={[asDefault(zone ? shareWords(treeRootWords, zone.treeRootShare).toLowerCase() : ''), ...ownOption(treeRootWords, zone && !zone.treeRootShareIsDefault ? zone.treeRootShare : null)]} />
      {state === 'established' ? (
        <SelectField control={form.control} name="cover" label="The grass covers" options={[asDefault(zone ? shareWords(coverWords, zone.coverFraction).toLowerCase() : ''), ...ownOption(coverWords, zone && !zone.coverFractionIsDefault ? zone.coverFraction : null)]} />
      ) : null}
      <ChoiceField control={form.control} name="state" label="The grass is" look="segments" options={[{ value: 'established', label: 'Established' }, { value: 'seeded', label: 'Newly seeded' }]} />
      {state === 'seeded' ? (
        <>
          <DateField control={form.control} name="seededOn" label="Sown on" />
          <SelectField control={form.control} name="mulch" label="Cover over the seed" options={mulches.map((id: Mulch) => ({ value: id, label: mulchWords[id] }))} />
        </>
      ) : null}
      <CheckboxField control={form.control} name="resting" label="Let it rest" hint="Brown by choice in summer: nothing is planned. Do not rest fescue sown within a year." />
      <NumberField control={form.control} name="priority" label="Turn" whole hint="When not everything fits, lower numbers come first." />
    </FactDialog>
  );
}

import { numberText, optionalNumberText } from '@/components/ui/numberText';
import { isCivilDay } from '@/scheduling/units/civilDay';
import type { UnitSystem } from '@/shared/contracts/common';
import { sprinklerKinds, type SprinklerKind } from '@/shared/contracts/equipment';
import type { SetUpYardRequest } from '@/shared/contracts/yards';
import { nameSchema } from '@/shared/contracts/common';
import { fromShown, toShown, unitLabel, type Quantity } from '@/shared/display';
import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { sprinklerKindWords } from '@/shared/zoneWords';

/** What stands in the fields, as typed. */
export interface SetUpText {
  tapName: string;
  bucketVolume: string;
  bucketSeconds: string;
  hoseLength: string;
  hoseBore: string;
  sprinklerKind: SprinklerKind;
  zones: { name: string; size: 'area' | 'sides'; area: string; sideA: string; sideB: string; seeded: 'established' | 'seeded'; seededOn: string }[];
}

export function emptyZone(name: string): SetUpText['zones'][number] {
  return { name, size: 'sides', area: '', sideA: '', sideB: '', seeded: 'established', seededOn: '' };
}

export function emptySetUp(): SetUpText {
  return { tapName: 'Back tap', bucketVolume: '', bucketSeconds: '', hoseLength: '', hoseBore: '15.875', sprinklerKind: 'oscillating', zones: [emptyZone('Front lawn')] };
}

/** Checks what was typed and turns it into the request, in SI. */
export function setUpSchema(units: UnitSystem) {
  const text = (quantity: Quantity, maxSi: number) => optionalNumberText({ min: 0.01, max: Math.floor(toShown(quantity, maxSi, units)), unit: unitLabel(quantity, units) });
  const si = (quantity: Quantity, shown: number | null) => (shown === null ? undefined : fromShown(quantity, shown, units));
  const zone = z.object({
    name: nameSchema, size: z.enum(['area', 'sides']), area: text('area', limits.areaMaxM2), sideA: text('length', limits.sideMaxM), sideB: text('length', limits.sideMaxM),
    seeded: z.enum(['established', 'seeded']), seededOn: z.string(),
  }).superRefine((values, issue) => {
    const missing = values.size === 'area' ? (values.area === null ? ['area'] : []) : [values.sideA === null ? 'sideA' : '', values.sideB === null ? 'sideB' : ''].filter(Boolean);
    missing.forEach((path) => issue.addIssue({ code: 'custom', path: [path], message: 'Give the size; pacing it out is good enough.' }));
    if (values.seeded === 'seeded' && !isCivilDay(values.seededOn)) {
      issue.addIssue({ code: 'custom', path: ['seededOn'], message: 'Give the day it was sown.' });
    }
  });
  return z.object({
    tapName: nameSchema,
    bucketVolume: text('volume', limits.bucketMaxL),
    bucketSeconds: optionalNumberText({ min: 1, max: limits.bucketMaxSeconds, unit: 's' }),
    hoseLength: numberText({ min: 1, max: Math.floor(toShown('length', limits.hoseLengthMaxM, units)), unit: unitLabel('length', units), missing: 'Give the length; it stands on the hose.' }),
    hoseBore: z.string(),
    sprinklerKind: z.enum(sprinklerKinds),
    zones: z.array(zone).min(1).max(limits.zonesPerYard),
  }).superRefine((values, issue) => {
    if ((values.bucketVolume === null) !== (values.bucketSeconds === null)) {
      issue.addIssue({ code: 'custom', path: [values.bucketVolume === null ? 'bucketVolume' : 'bucketSeconds'], message: 'A bucket test needs both: what the bucket holds and how long it took.' });
    }
  }).transform((values): SetUpYardRequest => ({
    tap: {
      name: values.tapName,
      bucketTest: values.bucketVolume !== null && values.bucketSeconds !== null ? { volumeL: fromShown('volume', values.bucketVolume, units), seconds: values.bucketSeconds } : null,
    },
    hose: { name: 'Hose', lengthM: fromShown('length', values.hoseLength, units), boreMm: Number(values.hoseBore) },
    sprinkler: { name: sprinklerKindWords[values.sprinklerKind].replace(/ \(.*/, ''), kind: values.sprinklerKind },
    zones: values.zones.map((one) => ({
      name: one.name,
      ...(one.size === 'area' ? { areaM2: si('area', one.area) } : { sideAM: si('length', one.sideA), sideBM: si('length', one.sideB) }),
      seededOn: one.seeded === 'seeded' ? one.seededOn : null,
    })),
  }));
}

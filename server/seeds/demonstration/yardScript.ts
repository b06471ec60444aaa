import type { z } from '@/shared/zod';
import type { createCatchTestRequestSchema } from '@/shared/contracts/catchTests';
import type { createHoseRequestSchema, createSprinklerRequestSchema, WeeklyLimit } from '@/shared/contracts/equipment';
import type { createPermitRequestSchema, createWaterRuleRequestSchema } from '@/shared/contracts/waterRules';
import type { CreateYardRequest, UpdateYardRequest } from '@/shared/contracts/yards';
import type { createZoneRequestSchema } from '@/shared/contracts/zones';
import type { PutObservationRequest } from '@/shared/contracts/ground';
import type { EstablishmentStageId } from '@/shared/contracts/proposals';
import type { SkipCause } from '@/shared/contracts/rounds';
import type { DemonstrationPerson } from './people';

/** What became of a planned round: done by somebody, ended after a part of its first set, left out with a cause, or forgotten. */
export type RoundFate = { by: DemonstrationPerson; cutShortTo?: number } | { by: DemonstrationPerson; skip: SkipCause } | 'forgotten';

export interface PositionScript {
  name: string;
  tap: string;
  hose: string;
  sprinkler: string;
  mark?: string;
  wettedAreaM2?: number;
  alternateSets?: boolean;
  weeklyLimit?: WeeklyLimit;
  /** Civil day and readings of its catch-cup test; a position without one keeps the rate of its flow. */
  catchTest?: { on: string } & Omit<z.input<typeof createCatchTestRequestSchema>, 'note'>;
}

/** A yard of the demonstration: its facts, and what its people did from day to day. What follows from them is computed as for any yard. */
export interface YardScript {
  yard: CreateYardRequest;
  owner: DemonstrationPerson;
  helper?: DemonstrationPerson;
  /** First day in the service. */
  fromOn: string;
  taps: { name: string; bucket?: { volumeL: number; seconds: number }; shutOffTimer?: boolean }[];
  hoses: z.input<typeof createHoseRequestSchema>[];
  sprinklers: z.input<typeof createSprinklerRequestSchema>[];
  zones: (z.input<typeof createZoneRequestSchema> & { positions: PositionScript[]; createdOn?: string })[];
  /** Hours at home from Monday to Friday and at the weekend, minutes after midnight. */
  hours: { weekdays: [number, number][]; weekend: [number, number][] };
  rules?: z.input<typeof createWaterRuleRequestSchema>[];
  /** Permits by the civil day on which somebody enters them, with the zones that they name. */
  permits?: (Omit<z.input<typeof createPermitRequestSchema>, 'zoneIds'> & { on: string; zones: string[] })[];
  /** House number, stage of shortage and supply. */
  water?: Pick<UpdateYardRequest, 'addressDigit' | 'waterStage' | 'supply'>;
  /** Readings of the rain gauge [mm] by civil day. */
  rainGauge?: Record<string, number>;
  /** What people saw on the ground, each in the evening of its day; a soil check stands for that morning. */
  seen?: ({ on: string; by: DemonstrationPerson; zone: string } & (
    { soil: PutObservationRequest } | { stage: EstablishmentStageId } | { sunnyHours: number[] }
  ))[];
  proposals?: { on: string; zone: string; depthsMm: [number, number, number, number]; dosesPerDay: [number, number, number, number]; reason: string; answer?: string }[];
  fateOf(on: string, roundIndex: number, kind: 'set' | 'dose'): RoundFate;
}

import type { EstablishmentSchedule } from '@/scheduling/establishment';
import { establishmentStages, type EstablishmentScheduleInput, type EstablishmentStageId, type ProposalResponse } from '@/shared/contracts/proposals';

interface ProposalFacts {
  id: string;
  zoneId: string;
  zoneName: string;
  authorId: string | null;
  authorName: string | null;
  reason: string;
  scheduleBefore: EstablishmentSchedule;
  schedule: EstablishmentSchedule;
  status: ProposalResponse['status'];
  answer: string;
  decidedById: string | null;
  decidedByName: string | null;
  decidedAt: Date | null;
  createdAt: Date;
}

const person = (id: string | null, name: string | null) => (id !== null && name !== null ? { id, name } : null);

/** The stages with doses of a schedule; an established stand has none and is not shown. */
export function presentSchedule(schedule: EstablishmentSchedule): EstablishmentScheduleInput {
  const withDoses = establishmentStages.filter((stage): stage is Exclude<EstablishmentStageId, 'established'> => stage !== 'established');
  return {
    stages: withDoses.flatMap((stage) => {
      const doses = schedule.stages.find((each) => each.stage === stage);
      return doses ? [{ stage, dosesPerDay: doses.dosesPerDay, everyDays: doses.everyDays, depthMm: doses.depthMm, timesMinutes: doses.timesMinutes, forDays: doses.forDays }] : [];
    }),
  };
}

export function presentProposal(row: ProposalFacts): ProposalResponse {
  return {
    id: row.id, zoneId: row.zoneId, zoneName: row.zoneName, author: person(row.authorId, row.authorName), reason: row.reason,
    scheduleBefore: presentSchedule(row.scheduleBefore), schedule: presentSchedule(row.schedule), status: row.status, answer: row.answer,
    decidedBy: person(row.decidedById, row.decidedByName), decidedAt: row.decidedAt?.toISOString() ?? null, createdAt: row.createdAt.toISOString(),
  };
}

import type { EstablishmentSchedule, StageDoses } from '@/scheduling/establishment';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatClock, formatDepth, formatNumber } from '@/shared/display';
import { stageWords } from '@/shared/reasons';
import { mailLayout } from './layout';

interface Mail {
  subject: string;
  text: string;
  html: string;
}

function dosesInWords(doses: StageDoses, units: UnitSystem): string {
  const times = doses.timesMinutes === null ? '' : ` at ${doses.timesMinutes.map((time) => formatClock(time, units)).join(', ')}`;
  const days = doses.everyDays === 1 ? 'each day' : `every ${formatNumber(doses.everyDays, 0)} days`;
  const length = doses.forDays === null ? '' : `, for ${formatNumber(doses.forDays, 0)} days`;
  return `${formatNumber(doses.dosesPerDay, 0)} × ${formatDepth(doses.depthMm, units)} ${days}${times}${length}`;
}

/** What a proposal changes, a line for each stage that would be watered otherwise. */
export function changedStages(before: EstablishmentSchedule, after: EstablishmentSchedule, units: UnitSystem): string[] {
  return after.stages.flatMap((doses) => {
    const old = before.stages.find((each) => each.stage === doses.stage);
    const words = { old: old ? dosesInWords(old, units) : 'nothing', next: dosesInWords(doses, units) };
    return words.old === words.next ? [] : [`While ${stageWords[doses.stage]}: ${words.next} (now ${words.old}).`];
  });
}

interface ProposalFacts {
  yardName: string;
  zoneName: string;
  authorName: string;
  reason: string;
  units: UnitSystem;
  before: EstablishmentSchedule;
  after: EstablishmentSchedule;
  url: string;
}

/** Tells an owner what the consultant proposes, and why. */
export function proposalMail(input: ProposalFacts): Mail {
  return {
    subject: `${input.zoneName}: a change of doses is proposed`,
    ...mailLayout({
      title: `${input.authorName} proposes a change for ${input.zoneName}`,
      paragraphs: [
        `Reason: ${input.reason}`,
        ...changedStages(input.before, input.after, input.units),
        `Nothing changes at ${input.yardName} until you accept.`,
      ],
      action: { label: 'Look at it and decide', url: input.url },
    }),
  };
}

/** Tells the author of a proposal what an owner decided. */
export function decisionMail(input: { yardName: string; zoneName: string; deciderName: string; accepted: boolean; answer: string; url: string }): Mail {
  const what = input.accepted ? 'accepted' : 'declined';
  return {
    subject: `${input.zoneName}: your proposal was ${what}`,
    ...mailLayout({
      title: `Your proposal for ${input.zoneName} was ${what}`,
      paragraphs: [
        `${input.deciderName} ${what} your proposal for ${input.zoneName} at ${input.yardName}.`,
        ...(input.answer === '' ? [] : [`Answer: ${input.answer}`]),
        input.accepted ? 'The doses are planned anew from today.' : 'The doses stay as they were.',
      ],
      action: { label: 'See the zone', url: input.url },
    }),
  };
}

import { ruleState, ruleText, permitText } from '@/components/yard/ruleWords';
import { positionFacts } from '@/components/yard/yardWords';
import type { PermitResponse, WaterRuleResponse } from '@/shared/contracts/waterRules';
import { permitState } from '@/shared/permitWords';
import { exampleYard } from '../../factories/yardResponse';

const yard = exampleYard();
const [rule] = yard.rules as [WaterRuleResponse];
const [permit] = yard.permits as [PermitResponse];

describe('a rule in words', () => {
  it('tells all that it says', () => {
    expect(ruleText(rule, 'us')).toBe(
      'houses ending in 0: Monday; in 1: Tuesday; in 2: Wednesday; in 3: Thursday; in 4: Friday; in 5: Saturday; in 6: Monday, Sunday; in 7, 8 or 9: no day; Monday, Thursday; odd dates; '
      + '5:00 am to 7:00 am and 8:00 am to 9:00 am and 8:00 pm to 10:00 pm; no hose unattended; binds only soaker hoses and a hose held in the hand; not newly seeded ground; from 15 May to 30 September; from shortage stage 3 on',
    );
  });

  it('holds or not by the stage and the number of the yard', () => {
    expect(ruleState(rule, yard)).toEqual({ text: 'Not in force: the yard is at stage 0 (default).', isMissing: false });
    expect(ruleState(rule, { ...yard, waterStage: 3, waterStageIsDefault: false })).toMatchObject({ isMissing: true });
    expect(ruleState(rule, { addressDigit: 6, waterStage: 4, waterStageIsDefault: false })).toEqual({ text: 'This house ends in 6: Monday, Sunday.', isMissing: false });
    expect(ruleState({ ...rule, weekdaysByDigit: null }, { ...yard, waterStage: 3 })?.text).toBe('In force: the yard is at stage 3.');
    expect(ruleState({ ...rule, weekdaysByDigit: null, stage: null }, yard)).toBeNull();
  });
});

describe('a permit in words', () => {
  it('names its zones, hours, months and what it lifts', () => {
    expect(permitText(permit, yard)).toBe('Back strip; from 10 June 2026; 6:00 am to 9:00 am; not in July and August; lifts Odd dates and mornings');
    expect(permitText({ ...permit, liftsRuleIds: null, windows: null, blackoutMonths: [] }, yard)).toBe('Back strip; from 10 June 2026; lifts every rule');
    expect(permitText({ ...permit, liftsRuleIds: [] }, yard)).toMatch(/lifts no rule$/);
  });

  it('says when it begins, ends and has ended', () => {
    expect(permitState(permit, '2026-06-01')).toEqual({ text: 'Begins on Wednesday 10 June, ends on 9 July 2026', phase: 'coming' });
    expect(permitState(permit, '2026-06-20')).toEqual({ text: 'Ends on Thursday 9 July', phase: 'holding' });
    expect(permitState(permit, '2026-07-09')).toEqual({ text: 'Ends today', phase: 'holding' });
    expect(permitState(permit, '2026-07-10')).toEqual({ text: 'Ended yesterday', phase: 'ended' });
  });
});

it('a position tells its turns, its height and its limit with who set it', () => {
  expect(positionFacts({ heightM: null, weeklyLimit: null, alternateSets: false }, 'metric')).toEqual([]);
  expect(positionFacts({ heightM: 3, weeklyLimit: { over: 'drain_field', depthMm: 12, source: 'The installer.' }, alternateSets: true }, 'metric')).toEqual([
    'alternate sets', '3 m above the lowest', 'over a drain field: at most 12 mm in seven days (The installer)',
  ]);
});

import { bucketPreview, bucketSchema } from '@/components/bucket-test/bucketDraft';

const typed = { volume: '5', seconds: '30', hoseId: '', sprinklerId: '' };

test('5 gallons in 30 seconds are 10 gpm (University of Idaho), shown with their range', () => {
  const preview = bucketPreview(typed, 'us');
  expect((preview?.flowLpm ?? 0) / 3.785411784).toBeCloseTo(10, 9);
  expect(preview?.range.low).toBeLessThan(preview?.flowLpm ?? 0);
  expect(preview?.isTooFast).toBe(false);
  // Half a second is 5 % of ten.
  expect(bucketPreview({ volume: '2', seconds: '11' }, 'us')?.isTooFast).toBe(false);
  expect(bucketPreview({ volume: '2', seconds: '9' }, 'us')?.isTooFast).toBe(true);
});

test('what was typed becomes a request in SI; no hose and no sprinkler are null', () => {
  expect(bucketSchema('us').parse(typed)).toEqual({ volumeL: expect.closeTo(18.927, 3) as number, seconds: 30, hoseId: null, sprinklerId: null });
});

test.each([[{ seconds: '0' }, 'seconds'], [{ seconds: '' }, 'seconds'], [{ volume: 'five' }, 'volume'], [{ volume: '100', seconds: '2' }, 'seconds'], [{ volume: '0.1', seconds: '3600' }, 'seconds']])('%j is refused at its field', (wrong, field) => {
  const checked = bucketSchema('us').safeParse({ ...typed, ...wrong });
  expect(checked.success).toBe(false);
  expect(checked.error?.issues[0]?.path).toEqual([field]);
  expect(checked.error?.issues[0]?.message).toBeTruthy();
});

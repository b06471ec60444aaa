import { pairedCups } from '@/scheduling/sprinkler/pairedCups';

const read = (brownMm: number[], greenMm: number[]) => pairedCups({ brownMm, greenMm, reading: { kind: 'volume', mouthAreaCm2: 50 } });

describe('cups in the brown patch and in the green beside it', () => {
  it('blame coverage when the brown patch gets little, and the ground when both get the same (trade practice)', () => {
    expect(read([1, 2], [12, 11])).toMatchObject({ verdict: 'coverage', isThin: false });
    expect(read([11, 10], [12, 11])).toMatchObject({ verdict: 'ground' });
    expect(read([8, 8], [12, 11]).verdict).toBe('unclear');
  });

  it('do not judge by what cannot be read, by empty cups or without saying that one cup is thin', () => {
    expect(pairedCups({ brownMm: [0], greenMm: [3], reading: { kind: 'depth' } })).toMatchObject({ verdict: 'unclear', isThin: true });
    expect(read([0, 0], [0, 0])).toEqual({ verdict: 'unclear', share: null, isThin: false });
    expect(() => read([], [1])).toThrow(expect.objectContaining({ field: 'brownMm' }));
    expect(() => read([1], [-1])).toThrow(expect.objectContaining({ field: 'greenMm[0]' }));
  });
});

import { requirePositive, requireRange } from '@/scheduling/units/physicsError';

/** How hard the drops of a sprinkler strike the ground. */
export const DROP_SIZES = ['fine', 'medium', 'coarse', 'stream'] as const;
export type DropSize = (typeof DROP_SIZES)[number];

/**
 * Share of the intake of bare ground that may be applied before seed moves, by drops: hard drops beat the surface shut and throw seed about.
 * Sources for the order: a strong stream moves seed, impulse heads have one (Iowa State 1996); low travelling heads throw big drops (extension.org).
 * The shares themselves are defaults, common practice.
 */
export const DROP_SHARES: Readonly<Record<DropSize, number>> = { fine: 1, medium: 0.75, coarse: 0.5, stream: 0.25 };

/** Drops to expect from a kind of sprinkler. Defaults, from the habits of the types named above. */
export const DROPS_OF_SPRINKLER: Readonly<Record<'oscillating' | 'impact' | 'fixed' | 'rotary' | 'travelling' | 'soaker' | 'hand_wand', DropSize>> = {
  oscillating: 'medium', impact: 'stream', fixed: 'medium', rotary: 'coarse', travelling: 'coarse', soaker: 'fine', hand_wand: 'fine',
};

/**
 * Greatest application rate at which a seedbed is not washed: the intake of the ground, less for hard drops on ground that nothing covers.
 * Straw takes the blow, so under a full cover only the intake counts.
 * @param input.intakeMmPerHour - intake of the bare ground [mm/h]
 * @param input.mulchCover - share of the ground covered, 0 to 1
 * @returns [mm/h]
 * @throws PhysicsError when the intake is not above zero or the cover outside 0 to 1
 */
export function washingLimitMmPerHour(input: { intakeMmPerHour: number; drops: DropSize; mulchCover: number }): number {
  const share = DROP_SHARES[input.drops];
  return requirePositive('intakeMmPerHour', input.intakeMmPerHour) * (share + (1 - share) * requireRange('mulchCover', input.mulchCover, 0, 1));
}

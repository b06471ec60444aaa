import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { useLockSet, useUnlockSet } from '@/components/data/useWishes';
import { Button } from '@/components/ui/Button';
import { showToast } from '@/components/ui/Toast';
import type { PlannedSetResponse } from '@/shared/contracts/plans';
import type { WishesResponse } from '@/shared/contracts/wishes';

/** Fixes a planned set, so that every new plan keeps it, or lets it go again. */
export function FixSet({ yardId, set, name, locks }: { yardId: string; set: PlannedSetResponse; name: string; locks: WishesResponse['locks'] }): ReactElement {
  const fix = useLockSet(yardId);
  const free = useUnlockSet(yardId);
  const own = locks.find((lock) => lock.positionId === set.positionId && lock.on === set.on && lock.startMinutes === set.startMinutes);
  const complain = (error: unknown) => void showToast({ message: errorMessage(error), tone: 'problem' });
  return own ? (
    <Button size="small" label="Let it go" accessibleLabel={`Let the fixed set ${name} go`} pending={free.isPending} onPress={() => free.mutate({ lockId: own.id }, { onError: complain })} />
  ) : (
    <Button size="small" label="Fix this set" accessibleLabel={`Fix the set ${name}`} pending={fix.isPending}
      onPress={() => fix.mutate({ positionId: set.positionId, on: set.on, startMinutes: set.startMinutes, minutes: Math.round(set.minutes), reason: '' }, { onError: complain })} />
  );
}

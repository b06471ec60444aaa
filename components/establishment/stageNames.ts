import type { EstablishmentStageId } from '@/shared/contracts/proposals';

export const stageNames: Record<EstablishmentStageId, string> = { sown: 'Until it is up', coming_up: 'Coming up', rooting: 'Rooting', taper: 'Taper', established: 'Established' };

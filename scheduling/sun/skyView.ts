import { requireRange } from '@/scheduling/units';
import { crownTransmissivity, requireObstacles, requirePoint, type Obstacle, type PlanePoint } from './obstacles';
import { FINE_SKY, skylineOf, skyViewsOf } from './skyline';

/**
 * Sky-view factor of a point on level ground among obstacles, by quadrature over directions and heights.
 * @param leafShareNow - share of the leaves on deciduous trees, 0-1
 * @returns 1 in the open, 0 under a roof [–]
 * @throws PhysicsError for impossible obstacles, with the field named
 * Source: view factor of an even sky; the middle of a long canyon of height H and width W sees cos(atan(2H/W)) (Oke 1981)
 */
export function skyViewFactor(point: PlanePoint, obstacles: readonly Obstacle[], leafShareNow = 1): number {
  requirePoint('point', point);
  requireObstacles(obstacles);
  requireRange('leafShareNow', leafShareNow, 0, 1);
  const skyline = skylineOf([point], obstacles);
  const transmissivities = skyline.trees.map((tree) => {
    const { inLeaf, bare } = crownTransmissivity(tree);
    return tree.leaves === 'evergreen' ? inLeaf : bare + (inLeaf - bare) * leafShareNow;
  });
  return skyViewsOf(skyline, transmissivities, FINE_SKY)[0] ?? 1;
}

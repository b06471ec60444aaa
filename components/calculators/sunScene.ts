import type { Obstacle, PlanePoint } from '@/scheduling/sun';

export type Side = 'south' | 'west' | 'north' | 'east';

/** A zone with a house, a tree and a fence beside it, each on one side. Lengths in metres. */
export interface SunScene {
  widthM: number;
  lengthM: number;
  house: { side: Side; awayM: number; heightM: number; lengthM: number } | null;
  tree: { side: Side; awayM: number; heightM: number; crownM: number; leaves: 'deciduous' | 'evergreen' } | null;
  fence: { side: Side; awayM: number; heightM: number } | null;
}

/** How deep a house is taken to be [m]; its far side hides nothing more. */
const HOUSE_DEPTH_M = 9;
/** A crown begins this far up the tree. Common practice. */
const CROWN_BASE_SHARE = 0.25;

/** A point beside the zone: so far out from the middle of a side, and so far along it. */
function beside({ widthM, lengthM }: SunScene, side: Side, outM: number, alongM: number): PlanePoint {
  switch (side) {
    case 'south':
      return { eastM: widthM / 2 + alongM, northM: -outM };
    case 'north':
      return { eastM: widthM / 2 - alongM, northM: lengthM + outM };
    case 'west':
      return { eastM: -outM, northM: lengthM / 2 - alongM };
    case 'east':
      return { eastM: widthM + outM, northM: lengthM / 2 + alongM };
  }
}

export function outlineOf({ widthM, lengthM }: SunScene): PlanePoint[] {
  return [{ eastM: 0, northM: 0 }, { eastM: widthM, northM: 0 }, { eastM: widthM, northM: lengthM }, { eastM: 0, northM: lengthM }];
}

export function obstaclesOf(scene: SunScene): Obstacle[] {
  const { house, tree, fence } = scene;
  const found: Obstacle[] = [];
  if (house) {
    const half = house.lengthM / 2;
    const corner = (outM: number, alongM: number) => beside(scene, house.side, outM, alongM);
    found.push({ kind: 'building', heightM: house.heightM, footprint: [corner(house.awayM, -half), corner(house.awayM, half), corner(house.awayM + HOUSE_DEPTH_M, half), corner(house.awayM + HOUSE_DEPTH_M, -half)] });
  }
  if (tree) {
    found.push({ kind: 'tree', at: beside(scene, tree.side, tree.awayM, 0), crownBaseM: CROWN_BASE_SHARE * tree.heightM, topM: tree.heightM, crownRadiusM: tree.crownM / 2, leaves: tree.leaves });
  }
  if (fence) {
    const half = (fence.side === 'south' || fence.side === 'north' ? scene.widthM : scene.lengthM) / 2 + 2;
    found.push({ kind: 'fence', heightM: fence.heightM, line: [beside(scene, fence.side, fence.awayM, -half), beside(scene, fence.side, fence.awayM, half)] });
  }
  return found;
}

import type { YardSeason } from '@/server/readModels/season';
import type { SeasonResponse } from '@/shared/contracts/season';

/** What the season holds for a yard. */
export function presentSeason({ outlook, zonesByGrass, source, sample, years }: YardSeason): SeasonResponse {
  const { preventer, freeze } = outlook;
  return {
    today: outlook.today, soilC: outlook.soilC, soilIsKnown: outlook.soilIsKnown, source, sample, years,
    grasses: outlook.grasses.map(({ grass, germination, sowing, dormantFromOn, needs }) => ({
      grass, zones: zonesByGrass.get(grass) ?? [], germination: germination.map(({ fromOn, untilOn }) => ({ fromOn, untilOn })),
      sowing: sowing.map(({ fromOn, untilOn, season }) => ({ fromOn, untilOn, season })), dormantFromOn, leastSoilC: needs.leastSoilC, mostSoilC: needs.mostSoilC, sources: needs.sources,
    })),
    preventer: {
      opensOn: preventer.opensOn, closesOn: preventer.closesOn, lastsUntilOn: preventer.lastsUntilOn, isNeverCold: preventer.isNeverCold, cautions: [...preventer.cautions], sources: [...preventer.sources],
    },
    freeze: freeze === null ? null : {
      earlyOn: freeze.earlyOn, likelyOn: freeze.likelyOn, lateOn: freeze.lateOn, hoseOffBy: freeze.hoseOffBy, seasons: freeze.seasons, frostFreeSeasons: freeze.frostFreeSeasons, source: freeze.source,
    },
    nextFreezeOn: outlook.nextFreezeOn,
  };
}

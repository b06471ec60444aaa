import { QueryTypes, type Sequelize } from 'sequelize';
import type { BudgetDayResponse } from '@/shared/contracts/water';

export interface BudgetZoneRow {
  zoneId: string;
  name: string;
  days: BudgetDayResponse[] | null;
}

/** Stored balance of every zone in use between two civil days, both included. */
export function readBudget(database: Sequelize, yardId: string, fromOn: string, toOn: string): Promise<BudgetZoneRow[]> {
  return database.query<BudgetZoneRow>(
    `SELECT z.id AS "zoneId", z.name,
       (SELECT json_agg(json_build_object('on', d."on", 'isForecast', d.is_forecast, 'et0Mm', d.et0_mm, 'shadedEt0Mm', d.shaded_et0_mm, 'cropCoefficient', d.crop_coefficient,
          'stressCoefficient', d.stress_coefficient, 'etcMm', d.etc_mm, 'rainMm', d.rain_mm, 'rainLossMm', d.rain_loss_mm, 'effectiveRainMm', d.effective_rain_mm,
          'evaporationMm', d.evaporation_mm, 'treeUptakeMm', d.tree_uptake_mm, 'runoffMm', d.runoff_mm, 'observationMm', d.observation_mm, 'surfaceDepletionMm', d.surface_depletion_mm,
          'condition', COALESCE(d.inputs->>'condition', 'growing'), 'depletionFraction', COALESCE((d.inputs->>'depletionFraction')::float8, 0.5), 'irrigationMm', d.irrigation_mm, 'drainageMm', d.drainage_mm, 'rootGrowthMm', d.root_growth_mm, 'depletionStartMm', d.depletion_start_mm,
          'depletionEndMm', d.depletion_end_mm, 'totalAvailableMm', d.total_available_mm, 'refillLineMm', d.refill_line_mm, 'rootDepthM', d.root_depth_m,
          'rainSource', d.rain_source, 'assumptions', d.inputs->'assumptions') ORDER BY d."on")
        FROM budget_days d WHERE d.yard_id = z.yard_id AND d.zone_id = z.id AND d."on" BETWEEN $2 AND $3) AS days
     FROM zones z WHERE z.yard_id = $1 AND z.archived_at IS NULL ORDER BY z.priority, z.created_at, z.id`,
    { bind: [yardId, fromOn, toOn], type: QueryTypes.SELECT },
  );
}

import { QueryTypes, type Sequelize } from 'sequelize';

/**
 * Marks a yard's budget and plan as behind its facts, in the transaction that changes a fact. The next read or tick
 * recomputes the budget from the earliest changed day and makes a new plan.
 * @param changedOn - first civil day whose balance the fact touches; null when only the plan is touched
 */
export async function factsChanged(database: Sequelize, yardId: string, changedOn: string | null): Promise<void> {
  await database.query(
    `UPDATE yards SET facts_version = facts_version + 1, budget_stale_from = LEAST(COALESCE(budget_stale_from, $2::date), COALESCE($2::date, budget_stale_from))
     WHERE id = $1`,
    { bind: [yardId, changedOn], type: QueryTypes.UPDATE },
  );
}

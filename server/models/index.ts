import type { Model, ModelStatic, Sequelize } from 'sequelize';
import { initAccounts } from './accounts';
import { initYards } from './yards';
import { initGround } from './ground';
import { initWater } from './water';
import { initWaterLimits } from './waterLimits';
import { initPlans } from './plans';
import { initMessages } from './messages';
import { initWishes } from './wishes';

export * from './accounts';
export * from './yards';
export * from './ground';
export * from './water';
export * from './waterLimits';
export * from './plans';
export * from './messages';
export * from './wishes';

/**
 * Binds every model to the connection of this process. Called once by the composition root.
 * Rows are stamped by the given clock, so that the demonstration's time and tests with a fixed time show in them.
 */
export function initModels(sequelize: Sequelize, now: () => Date): void {
  initAccounts(sequelize);
  initYards(sequelize);
  initWater(sequelize);
  initWaterLimits(sequelize);
  initGround(sequelize);
  initPlans(sequelize);
  initMessages(sequelize);
  initWishes(sequelize);
  const stamp = (row: Model, field: 'createdAt' | 'updatedAt') => {
    if (field in (row.constructor as ModelStatic<Model>).getAttributes()) {
      row.set(field, now());
    }
  };
  sequelize.addHook('beforeCreate', (row: Model) => {
    if (!row.get('createdAt')) {
      stamp(row, 'createdAt');
    }
    stamp(row, 'updatedAt');
  });
  sequelize.addHook('beforeUpdate', (row: Model) => {
    stamp(row, 'updatedAt');
  });
  sequelize.addHook('beforeBulkCreate', (rows: Model[]) => {
    rows.forEach((row) => {
      if (!row.get('createdAt')) {
        stamp(row, 'createdAt');
      }
      stamp(row, 'updatedAt');
    });
  });
}

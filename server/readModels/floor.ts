import { QueryTypes, type Sequelize } from 'sequelize';

/** The cheapest question a database can be asked. */
export async function readFloor(database: Sequelize): Promise<number> {
  const [row] = await database.query<{ one: number }>('SELECT 1 AS one', { type: QueryTypes.SELECT });
  return row?.one ?? 0;
}

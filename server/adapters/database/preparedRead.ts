import type { Client, QueryResultRow } from 'pg';
import type { Sequelize } from 'sequelize';

/**
 * Reads by a statement that each connection of the pool prepares once: a large query that many people send then costs its work alone, not its
 * planning. It takes a connection of its own, so it sees nothing of a transaction that the caller has open.
 * @param name - one for each text
 */
export async function preparedRead<Row extends QueryResultRow>(database: Sequelize, name: string, text: string, values: unknown[]): Promise<Row[]> {
  const connection = await database.connectionManager.getConnection({ type: 'read', useMaster: false });
  try {
    const { rows } = await (connection as Client).query<Row>({ name, text, values });
    return rows;
  } finally {
    database.connectionManager.releaseConnection(connection);
  }
}

import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';

// A person, where they are signed in, and the one-time links sent to them.

export type EmailTokenPurpose = 'confirm_email' | 'reset_password';

export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  declare id: string;
  declare name: string;
  declare email: string;
  declare passwordHash: string;
  declare emailConfirmedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initUser(sequelize: Sequelize): void {
  User.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    name: { type: DataTypes.TEXT, allowNull: false },
    email: { type: DataTypes.TEXT, allowNull: false },
    passwordHash: { type: DataTypes.TEXT, allowNull: false },
    emailConfirmedAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'users', underscored: true, timestamps: false });
}

export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
  declare id: string;
  declare userId: string;
  declare tokenHash: string;
  declare previousTokenHash: CreationOptional<string | null>;
  declare replacedAt: CreationOptional<Date | null>;
  declare device: string;
  declare createdAt: Date;
  declare lastUsedAt: Date;
  declare expiresAt: Date;
  declare endedAt: CreationOptional<Date | null>;
  declare endedBecause: CreationOptional<string | null>;
}

function initSession(sequelize: Sequelize): void {
  Session.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    userId: { type: DataTypes.UUID, allowNull: false },
    tokenHash: { type: DataTypes.TEXT, allowNull: false },
    previousTokenHash: { type: DataTypes.TEXT },
    replacedAt: { type: DataTypes.DATE },
    device: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    lastUsedAt: { type: DataTypes.DATE, allowNull: false },
    expiresAt: { type: DataTypes.DATE, allowNull: false },
    endedAt: { type: DataTypes.DATE },
    endedBecause: { type: DataTypes.TEXT },
  }, { sequelize, tableName: 'sessions', underscored: true, timestamps: false });
}

export class EmailToken extends Model<InferAttributes<EmailToken>, InferCreationAttributes<EmailToken>> {
  declare id: string;
  declare userId: string;
  declare purpose: EmailTokenPurpose;
  declare tokenHash: string;
  declare createdAt: Date;
  declare expiresAt: Date;
  declare usedAt: CreationOptional<Date | null>;
}

function initEmailToken(sequelize: Sequelize): void {
  EmailToken.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    userId: { type: DataTypes.UUID, allowNull: false },
    purpose: { type: DataTypes.TEXT, allowNull: false },
    tokenHash: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    expiresAt: { type: DataTypes.DATE, allowNull: false },
    usedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'email_tokens', underscored: true, timestamps: false });
}

export class IdempotencyKey extends Model<InferAttributes<IdempotencyKey>, InferCreationAttributes<IdempotencyKey>> {
  declare userId: string;
  declare key: string;
  declare requestHash: string;
  declare status: number;
  declare response: unknown;
  declare createdAt: Date;
}

function initIdempotencyKey(sequelize: Sequelize): void {
  IdempotencyKey.init({
    userId: { type: DataTypes.UUID, primaryKey: true },
    key: { type: DataTypes.TEXT, primaryKey: true },
    requestHash: { type: DataTypes.TEXT, allowNull: false },
    status: { type: DataTypes.INTEGER, allowNull: false },
    response: { type: DataTypes.JSONB, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'idempotency_keys', underscored: true, timestamps: false });
}

/** Binds the models of this file to one database connection. */
export function initAccounts(sequelize: Sequelize): void {
  initUser(sequelize);
  initSession(sequelize);
  initEmailToken(sequelize);
  initIdempotencyKey(sequelize);
}

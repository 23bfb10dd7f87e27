import { sql } from 'drizzle-orm';
import { boolean, index, integer, pgTable, primaryKey, text, timestamp, uniqueIndex } from 'drizzle-orm/pg-core';
import type { Role } from '#lib/contracts/user.ts';
import { createdAt, id } from './columns.ts';

export const users = pgTable(
	'users',
	{
		id: id(),
		email: text('email').notNull(),
		name: text('name').notNull(),
		passphraseHash: text('passphrase_hash').notNull(),
		/** raised to end every session of the person at once */
		sessionVersion: integer('session_version').notNull().default(1),
		isDemo: boolean('is_demo').notNull().default(false),
		createdAt: createdAt()
	},
	(table) => [uniqueIndex('users_email').on(sql`lower(${table.email})`)]
);

export const labs = pgTable('labs', {
	id: id(),
	name: text('name').notNull(),
	personal: boolean('personal').notNull().default(false),
	createdAt: createdAt()
});

export const memberships = pgTable(
	'memberships',
	{
		labId: text('lab_id')
			.notNull()
			.references(() => labs.id, { onDelete: 'cascade' }),
		userId: text('user_id')
			.notNull()
			.references(() => users.id, { onDelete: 'cascade' }),
		role: text('role').$type<Role>().notNull(),
		createdAt: createdAt()
	},
	(table) => [primaryKey({ columns: [table.labId, table.userId] }), index('memberships_user').on(table.userId)]
);

/** Long-lived bearer tokens of scripts; only the SHA-256 of a token is kept. */
export const tokens = pgTable(
	'tokens',
	{
		id: id(),
		userId: text('user_id')
			.notNull()
			.references(() => users.id, { onDelete: 'cascade' }),
		label: text('label').notNull(),
		hash: text('hash').notNull(),
		lastUsedAt: timestamp('last_used_at', { withTimezone: true }),
		createdAt: createdAt(),
		revokedAt: timestamp('revoked_at', { withTimezone: true })
	},
	(table) => [uniqueIndex('tokens_hash').on(table.hash)]
);

/** Counts attempts per key (account and address) for the rate limits; old rows are swept. */
export const attempts = pgTable('attempts', {
	key: text('key').primaryKey(),
	count: integer('count').notNull(),
	windowStart: timestamp('window_start', { withTimezone: true }).notNull()
});

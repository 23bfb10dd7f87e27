import { customType, text, timestamp } from 'drizzle-orm/pg-core';

export const bytea = customType<{ data: Buffer; driverData: Buffer }>({ dataType: () => 'bytea' });

export const id = () => text('id').primaryKey();
export const createdAt = () => timestamp('created_at', { withTimezone: true }).notNull().defaultNow();
/** set when something is deleted; it can be brought back until it is purged */
export const deletedAt = () => timestamp('deleted_at', { withTimezone: true });

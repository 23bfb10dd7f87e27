import { randomBytes } from 'node:crypto';

/** 128 random bits in 22 letters that stand in an address as they are. */
export function newId(): string {
	return randomBytes(16).toString('base64url');
}

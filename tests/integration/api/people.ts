import type { SignedInUser } from '#lib/contracts/user.ts';
import { hashPassphrase, randomPassphrase } from '#lib/server/passphrase.ts';
import { can } from '#lib/server/permissions.ts';
import * as labs from '#lib/server/repositories/labs.ts';
import * as tokens from '#lib/server/repositories/tokens.ts';
import * as users from '#lib/server/repositories/users.ts';

export type Person = { readonly user: SignedInUser; readonly email: string; readonly passphrase: string; readonly token: string };

/** Three people of one lab, and a stranger with a lab of their own. */
export type People = {
	readonly lab: string;
	readonly lead: Person;
	readonly analyst: Person;
	readonly reader: Person;
	readonly stranger: Person;
};

export async function startPeople(): Promise<People> {
	const lead = await register('lead');
	const lab = await labs.create({ name: 'Shared lab', lead: lead.user.id });
	const analyst = await register('analyst');
	const reader = await register('reader');
	await labs.join(lab, analyst.user.id, 'analyst');
	await labs.join(lab, reader.user.id, 'reader');
	return { lab, lead, analyst, reader, stranger: await register('stranger') };
}

async function register(name: string): Promise<Person> {
	const email = `${name}@lab.example`;
	const passphrase = randomPassphrase();
	const id = await users.register({ email, name, passphraseHash: await hashPassphrase(passphrase) });
	const holder = id === null ? null : await users.sessionHolder(id);
	if (holder === null) throw new Error(`Expected to register ${email}; it is there already.`);
	const token = await tokens.create(await can(holder.user, 'create', { account: holder.user.id }), 'tests');
	return { user: holder.user, email, passphrase, token };
}

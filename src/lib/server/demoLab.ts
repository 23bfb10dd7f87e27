import type { Role } from '#lib/contracts/user.ts';
import { hashPassphrase } from './passphrase.ts';
import * as labs from './repositories/labs.ts';
import * as users from './repositories/users.ts';

export const DEMO_PASSPHRASE = 'lanterns over the merrow';
const LAB = 'Highland Ecology Lab';
type DemoAccount = { readonly email: string; readonly name: string; readonly role: Role };
export const DEMO_ACCOUNTS: readonly DemoAccount[] = [
	{ email: 'lead@demo.example', name: 'Ines Marrow', role: 'lead' },
	{ email: 'analyst@demo.example', name: 'Tomas Fell', role: 'analyst' },
	{ email: 'reader@demo.example', name: 'Ada Burnside', role: 'reader' }
];

/** The lab of the demo with its three accounts, made once; returns the lab and its lead. */
export async function seedDemoLab(): Promise<{ lab: string; lead: string }> {
	const passphraseHash = await hashPassphrase(DEMO_PASSPHRASE);
	let lab = await labs.findByName(LAB);
	for (const { role, ...person } of DEMO_ACCOUNTS) {
		const joins = lab === null ? {} : { joins: { lab, role } };
		const id = await users.register({ ...person, passphraseHash, isDemo: true, ...joins });
		if (id !== null && lab === null) lab = await labs.create({ name: LAB, lead: id });
	}
	const lead = await users.credentialsOf('lead@demo.example');
	if (lab === null || lead === null) throw new Error('Expected the demo lab and its lead after seeding.');
	return { lab, lead: lead.id };
}

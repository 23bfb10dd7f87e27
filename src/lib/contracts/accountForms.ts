import { z } from 'zod';

const email = z
	.string()
	.trim()
	.max(320, 'An e-mail address has at most 320 characters.')
	.pipe(z.email('Write the e-mail address as name@example.org.'));
const name = z
	.string()
	.trim()
	.min(1, 'Write the name others in a lab will see.')
	.max(120, 'A name may have at most 120 characters.');
const given = (what: string) => z.string().min(1, what);

export const signInForm = z.object({
	email: z.string().trim().min(1, 'Write your e-mail address.').max(320),
	passphrase: given('Write your passphrase.'),
	next: z.string().optional()
});

export const registerForm = z.object({ name, email, passphrase: given('Choose a passphrase.') });
export const renameForm = z.object({ name });
export const passphraseForm = z.object({
	current: given('Write the passphrase you have now.'),
	passphrase: given('Choose a new passphrase.')
});
export const tokenForm = z.object({
	label: z.string().trim().min(1, 'Name what will use it.').max(200, 'A label may have at most 200 characters.')
});
export const revokeForm = z.object({ token: z.string().min(1) });

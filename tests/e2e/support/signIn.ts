import type { Page } from '@playwright/test';

const DEMO_PASSPHRASE = 'lanterns over the merrow';

export async function signIn(page: Page, who: 'lead' | 'analyst' | 'reader'): Promise<void> {
	await page.goto('/sign-in');
	await page.fill('input[name=email]', `${who}@demo.example`);
	await page.fill('input[name=passphrase]', DEMO_PASSPHRASE);
	await page.getByRole('main').getByRole('button', { name: 'Sign in' }).click();
	await page.waitForURL('**/studies');
}

/** A bearer token of a demo account, as a script gets it. */
export async function tokenOf(baseURL: string, who: 'lead' | 'analyst' | 'reader'): Promise<string> {
	const answer = await fetch(`${baseURL}/api/v1/tokens`, {
		method: 'POST',
		headers: { 'content-type': 'application/json' },
		body: JSON.stringify({ email: `${who}@demo.example`, password: DEMO_PASSPHRASE, label: 'browser tests' })
	});
	if (answer.status !== 201) throw new Error(`No token: ${answer.status} ${await answer.text()}`);
	return ((await answer.json()) as { token: string }).token;
}

import { expect, type Page } from '@playwright/test';
import { readFileSync } from 'node:fs';
import { firstLink } from '../screens/findPages.ts';
import { faultsOf } from './support/audit.ts';
import { BREAKS, byScript, NEVER_ENDS } from './support/exampleByScript.ts';
import { paste } from './support/paste.ts';
import { test } from './support/signedIn.ts';

// Each looks several times; on a busy machine one look takes ten seconds.
test.setTimeout(240_000);

const messy = (file: string) => readFileSync(`static/examples/messy/${file}`, 'utf8');
const studyOf = (page: Page, baseURL: string | undefined) =>
	firstLink(page, `${baseURL ?? ''}/studies`, /^\/studies\/[^/]+$/, 'Lanternfrogs');

// What these pages look like between their first and their last state; every test ends with what axe and the window say.
test('sign-in and register say what is wrong, and stay accessible', async ({ page }) => {
	await page.goto('/sign-in');
	await page.fill('input[name=email]', 'nobody@demo.example');
	await page.fill('input[name=passphrase]', 'not the right one');
	await page.getByRole('main').getByRole('button', { name: 'Sign in' }).click();
	await expect(page.getByRole('alert')).toBeVisible();
	const signInFaults = await faultsOf(page, 'sign-in refused');

	await page.goto('/register');
	await page.getByLabel('Name').fill('Nobody');
	await page.getByLabel('E-mail address').fill('nobody@demo.example');
	await page.getByLabel('Passphrase').fill('too short');
	await page.getByRole('button', { name: 'Make the account' }).click();
	await expect(page.getByRole('alert')).toBeVisible();
	await expect(page.getByLabel('E-mail address')).toHaveValue('nobody@demo.example');
	expect([...signInFaults, ...(await faultsOf(page, 'register refused'))]).toEqual([]);
});

test('an analysis that runs and one that was stopped are accessible and fit', async ({ lead, leadToken, request, baseURL }) => {
	const study = await studyOf(lead, baseURL);
	const analysis = await byScript(request, leadToken).startWith(study.replace('/studies/', ''), NEVER_ENDS);
	await lead.goto(analysis);
	await expect(lead.getByRole('heading', { level: 1 })).toHaveText('Shuffling the species');
	await expect(lead.getByRole('progressbar')).not.toHaveAttribute('value', '0');
	const faults = await faultsOf(lead, 'a running analysis');

	await lead.getByRole('button', { name: 'Stop' }).click();
	await expect(lead.getByRole('heading', { level: 1 })).toHaveText('This analysis was stopped');
	expect([...faults, ...(await faultsOf(lead, 'a stopped analysis'))]).toEqual([]);
});

test('an analysis that failed says so with a reference, and is accessible and fits', async ({
	lead,
	leadToken,
	request,
	baseURL
}) => {
	const study = await studyOf(lead, baseURL);
	const analysis = await byScript(request, leadToken).startWith(study.replace('/studies/', ''), BREAKS);
	await lead.goto(analysis);
	await expect(lead.getByRole('heading', { level: 1 })).toHaveText('This analysis failed');
	await expect(lead.getByRole('alert')).toContainText('your data are unchanged');
	await expect(lead.getByRole('alert')).not.toContainText('a defect');
	await expect(lead.getByRole('button', { name: 'Run again' })).toBeVisible();
	expect(await faultsOf(lead, 'a failed analysis')).toEqual([]);
});

test('the form of a report is accessible and fits, new, refused and to be changed', async ({ lead, baseURL }) => {
	const study = await studyOf(lead, baseURL);
	const analysis = await firstLink(lead, `${baseURL ?? ''}${study}/analyses`, /\/analyses\/(?!new)[^/?]+$/, 'Overlap falls');
	await lead.goto(`${study}/reports/new?analysis=${analysis.split('/').at(-1) ?? ''}`);
	const faults = await faultsOf(lead, 'a new report');

	await lead.getByLabel('Title').fill('');
	await lead.getByLabel('Notes').fill('kept while the title is asked for');
	await lead.getByRole('button', { name: /save/i }).click();
	await expect(lead.getByRole('alert')).toBeVisible();
	await expect(lead.getByLabel('Notes')).toHaveValue('kept while the title is asked for');
	faults.push(...(await faultsOf(lead, 'a report without a title')));

	await lead.getByLabel('Title').fill('Seen in every state');
	await lead.getByRole('button', { name: /save/i }).click();
	await lead.waitForURL(/\/reports\/(?!new)[^/?]+$/);
	faults.push(...(await faultsOf(lead, 'a report')));
	await lead.goto(`${lead.url()}/edit`);
	faults.push(...(await faultsOf(lead, 'a report to be changed')));
	expect(faults).toEqual([]);
});

test('drafts with questions, a text that cannot be read, and open names are accessible and fit', async ({
	lead,
	leadToken,
	request
}) => {
	const script = byScript(request, leadToken);
	const { id } = await script.newStudy('Names that differ');
	await lead.goto(`/studies/${id}/materials`, { waitUntil: 'networkidle' });
	await paste(lead, 'x,A,B,C\nA,100,50,20\nB,55,100,30\nC,20,30,100\n');
	await expect(lead.getByText('3 species · 3 pairs')).toBeVisible();
	await paste(lead, '((A:1,B:1):2,C:3;');
	await expect(lead.getByRole('heading', { name: 'The pasted text cannot be read yet' })).toBeVisible();
	const faults = await faultsOf(lead, 'drafts with questions and faults');

	await script.addTree(id, messy('tree.nwk'));
	await script.addMatrix(id, messy('pair-list.csv'));
	await lead.goto(`/studies/${id}/names`, { waitUntil: 'networkidle' });
	await expect(lead.getByRole('heading', { level: 1 })).toContainText(/need/i);
	expect([...faults, ...(await faultsOf(lead, 'open names'))]).toEqual([]);
});

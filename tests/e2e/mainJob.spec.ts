import AxeBuilder from '@axe-core/playwright';
import { mkdirSync } from 'node:fs';
import { execFileSync } from 'node:child_process';
import { expect, test, type Page } from '@playwright/test';
import { meadowExpected, meadowMatrix, meadowTree, monteCarloRoom } from './support/meadow.ts';
import { paste } from './support/paste.ts';

const SHUFFLES = 99_999;

async function keep(page: Page): Promise<void> {
	const button = page.getByRole('button', { name: 'Keep', exact: true });
	await button.click();
	await expect(button).toHaveCount(0);
	await expect(page.locator('#kept-note')).toBeVisible();
}

function shownNumber(text: string): number {
	return Number(text.replace('−', '-').replace(/[^\d.e-]/g, ''));
}

// The main job on real input, as a new person does it: register, study, tree, matrix, plan, findings, report.
test('a new person gets from two texts to slope, p and a report', async ({ page }, info) => {
	const email = `mara.${Date.now()}@meadow.example`;
	await page.goto('/register');
	await page.getByLabel('Name').fill('Mara Wald');
	await page.getByLabel('E-mail address').fill(email);
	await page.getByLabel('Passphrase').fill('six damp boots by the gate');
	await page.getByRole('button', { name: 'Make the account' }).click();
	if (page.url().includes('sign-in') || page.url().includes('register')) {
		await page.goto('/sign-in');
		await page.fill('input[name=email]', email);
		await page.fill('input[name=passphrase]', 'six damp boots by the gate');
		await page.getByRole('main').getByRole('button', { name: 'Sign in' }).click();
	}
	await page.waitForURL('**/studies');

	await page.getByLabel('Title').fill('Plants of dune meadows');
	await page.getByRole('main').getByRole('button', { name: 'Paste a tree' }).click();
	await page.waitForURL(/\/studies\/[^/?]+/);
	const study = new URL(page.url()).pathname.split('/').slice(0, 3).join('/');

	await page.goto(`${study}/materials`);
	await page.waitForLoadState('networkidle');
	await paste(page, meadowTree);
	await expect(page.getByText('30 tips · root 410.9 Ma')).toBeVisible();
	await keep(page);
	await paste(page, meadowMatrix);
	await expect(page.getByText('30 species · 435 pairs')).toBeVisible();
	await page.getByRole('combobox', { name: /measure/i }).selectOption('schoener-d');
	await keep(page);

	await page.goto(`${study}/names`);
	await expect(page.getByRole('heading', { level: 1 })).toContainText(/agree/i);

	await page.goto(`${study}/analyses/new`);
	await expect(page.getByText('30 shared species')).toBeVisible();
	await expect(page.getByText('99,999', { exact: true })).toBeVisible();
	await page.getByRole('button', { name: 'Run', exact: true }).click();
	await page.waitForURL(/\/analyses\/(?!new)[^/?]+$/);

	await expect(page.getByRole('heading', { level: 1 })).toHaveText(
		'No relation across the whole tree; within the two sides of the root, overlap falls'
	);
	const figures = page.locator('dl dd.value');
	await expect(figures.nth(0)).toHaveText('−6.21 × 10⁻⁵');
	const p = shownNumber(await figures.nth(1).innerText());
	expect(Math.abs(p - meadowExpected.pLess)).toBeLessThan(monteCarloRoom(meadowExpected.pLess, SHUFFLES) + 0.005);
	const within = shownNumber(await figures.nth(2).innerText());
	expect(Math.abs(within - meadowExpected.withinDeepestSplit.pLess)).toBeLessThan(
		monteCarloRoom(meadowExpected.withinDeepestSplit.pLess, SHUFFLES) + 0.0005
	);

	await page
		.getByRole('link', { name: 'Save report' })
		.or(page.getByRole('button', { name: 'Save report' }))
		.click();
	await page.waitForURL(/\/reports\/new/);
	await page.getByLabel('Title').fill('Dune meadow plants: overlap against age');
	await page.getByRole('button', { name: /save/i }).click();
	await page.waitForURL(/\/reports\/(?!new)[^/?]+/);
	await expect(page.getByRole('heading', { level: 1 })).toContainText('Dune meadow plants');
	const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze();
	expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html ?? ''}`)).toEqual([]);

	mkdirSync(info.outputDir, { recursive: true });
	const pdf = info.outputPath('report.pdf');
	const download = page.waitForEvent('download');
	await page.getByRole('link', { name: /report, pdf/i }).click();
	await (await download).saveAs(pdf);
	const text = execFileSync('pdftotext', ['-layout', pdf, '-'], { encoding: 'utf8' });
	expect(text).toContain('Dune meadow plants');
	expect(text.replaceAll(/\s+/g, ' ')).toContain(
		'There is no detectable relation across the whole tree; within the sides of the root overlap falls with age'
	);
	const fonts = execFileSync('pdffonts', [pdf], { encoding: 'utf8' }).split('\n').slice(2).filter(Boolean);
	expect(fonts.length).toBeGreaterThan(0);
	// Columns of pdffonts: …, emb, sub, uni, object ID. Every font is embedded.
	for (const line of fonts) expect(line).toMatch(/\s(yes)\s+(yes|no)\s+(yes|no)\s+\d+\s+\d+\s*$/);
});

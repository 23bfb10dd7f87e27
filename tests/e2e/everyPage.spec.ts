import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { findPages, type ShownPage } from '../screens/findPages.ts';
import { signIn } from './support/signIn.ts';

const WIDTHS = [1440, 390] as const;

for (const theme of ['light', 'dark'] as const) {
	test(`every page of the example is accessible and fits, ${theme}`, async ({ browser, baseURL }) => {
		test.setTimeout(400_000);
		const finder = await browser.newPage();
		await signIn(finder, 'lead');
		const pages = await findPages(finder, baseURL ?? '');
		await finder.close();
		const faults: string[] = [];
		for (const signedIn of [false, true]) {
			const context = await browser.newContext({ colorScheme: theme, reducedMotion: 'reduce' });
			const page = await context.newPage();
			page.on('pageerror', (error) => faults.push(`${page.url()}: ${error.message}`));
			if (signedIn) await signIn(page, 'lead');
			for (const shown of pages.filter((one) => one.signedIn === signedIn)) faults.push(...(await faultsOf(page, shown)));
			await context.close();
		}
		expect(faults).toEqual([]);
	});
}

async function faultsOf(page: import('@playwright/test').Page, { name, path }: ShownPage): Promise<string[]> {
	const faults: string[] = [];
	for (const width of WIDTHS) {
		await page.setViewportSize({ width, height: 900 });
		await page.goto(path, { waitUntil: 'networkidle' });
		const overflow = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
		if (overflow > 0) faults.push(`${name} at ${width} px is ${overflow} px too wide`);
		const headings = await page.locator('h1').count();
		if (headings !== 1) faults.push(`${name} has ${headings} first headings`);
		const { violations } = await new AxeBuilder({ page })
			.withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
			.analyze();
		for (const { id, nodes } of violations)
			faults.push(`${name} at ${width} px: ${id}: ${nodes.map(({ html }) => html.slice(0, 120)).join(' | ')}`);
	}
	return faults;
}

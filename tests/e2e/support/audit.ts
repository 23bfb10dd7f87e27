import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';

const WIDTHS = [1440, 390] as const;
const STANDARDS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/** Brings a page before the reader anew; at a narrow width it is asked again. */
export type Opening = (page: Page) => Promise<unknown>;

/**
 * What is wrong with a page at a desk and on a phone, in light and dark: what axe finds, a page wider than its window, not
 * exactly one first heading. Only colours differ between the themes, so the dark one is asked about contrast alone.
 */
export async function faultsOf(page: Page, name: string, open?: Opening): Promise<string[]> {
	const faults: string[] = [];
	for (const width of WIDTHS) {
		await page.setViewportSize({ width, height: 900 });
		await page.emulateMedia({ colorScheme: 'light', reducedMotion: 'reduce' });
		await open?.(page);
		const at = `${name} at ${width} px`;
		faults.push(...(await formFaults(page)).map((fault) => `${at}: ${fault}`));
		faults.push(...(await axeFaults(page)).map((fault) => `${at}: ${fault}`));
		await page.emulateMedia({ colorScheme: 'dark', reducedMotion: 'reduce' });
		faults.push(...(await axeFaults(page, ['color-contrast'])).map((fault) => `${at}, dark: ${fault}`));
	}
	return faults;
}

async function formFaults(page: Page): Promise<string[]> {
	const overflow = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
	const headings = await page.locator('h1').count();
	return [...(overflow > 0 ? [`${overflow} px too wide`] : []), ...(headings === 1 ? [] : [`${headings} first headings`])];
}

async function axeFaults(page: Page, rules: readonly string[] = []): Promise<string[]> {
	// There are no frames to look into, and without them one blank page less is opened for each look.
	const axe = new AxeBuilder({ page }).setLegacyMode(true);
	const { violations } = await (rules.length > 0 ? axe.withRules([...rules]) : axe.withTags(STANDARDS)).analyze();
	return violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 120)).join(' | ')}`);
}

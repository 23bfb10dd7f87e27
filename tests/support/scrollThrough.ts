import type { Page } from '@playwright/test';

const STEP_PX = 600;
const PAUSE_MS = 60;

/** Goes down a page and up again, so that the parts that are fetched when a reader comes near are there. */
export async function scrollThrough(page: Page): Promise<void> {
	for (let y = 0; y < (await page.evaluate(() => document.documentElement.scrollHeight)); y += STEP_PX) {
		await page.evaluate((to) => window.scrollTo(0, to), y);
		await page.waitForTimeout(PAUSE_MS);
	}
	await page.waitForLoadState('networkidle');
	await page.evaluate(() => window.scrollTo(0, 0));
}

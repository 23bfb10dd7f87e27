import { test as base, type BrowserContextOptions, type Page } from '@playwright/test';
import { signIn, tokenOf } from './signIn.ts';

type Kept = { readonly leadState: NonNullable<BrowserContextOptions['storageState']>; readonly leadToken: string };

/** Tests that share one sign-in of the lead of the demo: `lead` is a page of a signed-in browser, `leadToken` a script's key. */
export const test = base.extend<{ lead: Page }, Kept>({
	leadState: [
		async ({ browser }, use, { project }) => {
			const page = await browser.newPage(project.use.baseURL === undefined ? {} : { baseURL: project.use.baseURL });
			await signIn(page, 'lead');
			await use(await page.context().storageState());
			await page.context().close();
		},
		{ scope: 'worker' }
	],
	leadToken: [
		async ({ browserName: _ }, use, { project }) => use(await tokenOf(project.use.baseURL ?? '', 'lead')),
		{ scope: 'worker' }
	],
	lead: async ({ browser, leadState, baseURL }, use) => {
		const context = await browser.newContext({ storageState: leadState, ...(baseURL === undefined ? {} : { baseURL }) });
		await use(await context.newPage());
		await context.close();
	}
});

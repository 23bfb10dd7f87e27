import { expect, type Page } from '@playwright/test';
import { scrollThrough } from '../support/scrollThrough.ts';
import { findPages } from '../screens/findPages.ts';
import { faultsOf } from './support/audit.ts';
import { test } from './support/signedIn.ts';

// A minute on a quiet machine; a busy one is given time.
test.setTimeout(600_000);

for (const who of ['a visitor', 'a member'] as const) {
	test(`every page that ${who} sees of the example is accessible and fits`, async ({ page, lead, baseURL }) => {
		const reader = who === 'a member' ? lead : page;
		const shown = (await findPages(lead, baseURL ?? '')).filter(({ signedIn }) => signedIn === (who === 'a member'));
		const faults: string[] = [];
		reader.on('pageerror', (error) => faults.push(`${reader.url()}: ${error.message}`));
		for (const { name, path } of shown) faults.push(...(await faultsOf(reader, name, () => openWhole(reader, path))));
		expect(faults).toEqual([]);
	});
}

/** With the parts that are fetched when a reader comes near. */
async function openWhole(reader: Page, path: string): Promise<void> {
	await reader.goto(path, { waitUntil: 'networkidle' });
	await scrollThrough(reader);
}

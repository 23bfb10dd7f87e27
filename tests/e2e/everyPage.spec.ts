import { expect } from '@playwright/test';
import { findPages } from '../screens/findPages.ts';
import { faultsOf } from './support/audit.ts';
import { test } from './support/signedIn.ts';

test('every page of the example is accessible and fits, at a desk and on a phone, in light and dark', async ({
	page,
	lead,
	baseURL
}) => {
	test.setTimeout(600_000);
	const pages = await findPages(lead, baseURL ?? '');
	const faults: string[] = [];
	for (const reader of [page, lead]) reader.on('pageerror', (error) => faults.push(`${reader.url()}: ${error.message}`));
	for (const { name, path, signedIn } of pages) {
		const reader = signedIn ? lead : page;
		faults.push(...(await faultsOf(reader, name, () => reader.goto(path, { waitUntil: 'networkidle' }))));
	}
	expect(faults).toEqual([]);
});

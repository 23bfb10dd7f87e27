import type { Page } from '@playwright/test';

export type ShownPage = { readonly name: string; readonly path: string; readonly signedIn: boolean };

/** Every kind of page of the example, found by following its own links. */
export async function findPages(page: Page, address: string): Promise<ShownPage[]> {
	const study = await firstLink(page, `${address}/studies`, /^\/studies\/[^/]+$/, 'Lanternfrogs');
	// Newest first: the main job, the one that asks everything, the one over all trees.
	const analyses = await links(page, `${address}${study}/analyses`, /^\/studies\/[^/]+\/analyses\/(?!new|changes)[^/?]+$/);
	const [analysis, everything, overTrees] = [...new Set(analyses.map(({ href }) => href))];
	if (analysis === undefined || everything === undefined || overTrees === undefined)
		throw new Error('Expected three analyses of the example.');
	const run = await firstLink(page, `${address}${study}/overlaps`, /^\/studies\/[^/]+\/overlaps\/[^/?]+$/);
	const lab = await firstLink(page, `${address}/studies`, /^\/labs\/[^/]+$/);
	const open: [string, string][] = [
		['front', '/'],
		['sign-in', '/sign-in'],
		['register', '/register'],
		['help', '/help'],
		['api', '/api/v1'],
		['visitor-study', study]
	];
	const inside: [string, string][] = [
		['studies', '/studies'],
		['study', study],
		['materials', `${study}/materials`],
		['names', `${study}/names`],
		['overlaps', `${study}/overlaps`],
		['overlap-run', run],
		['analyses', `${study}/analyses`],
		['plan', `${study}/analyses/new`],
		['analysis', analysis],
		['analysis-everything', everything],
		['analysis-over-trees', overTrees],
		['changes', `${study}/analyses/changes`],
		['reports', `${study}/reports`],
		['lab', lab],
		['account', '/account']
	];
	return [
		...open.map(([name, path]) => ({ name, path, signedIn: false })),
		...inside.map(([name, path]) => ({ name, path, signedIn: true }))
	];
}

export async function firstLink(page: Page, from: string, pattern: RegExp, text = ''): Promise<string> {
	const found = (await links(page, from, pattern)).find((link) => link.text.includes(text));
	if (found === undefined) throw new Error(`Expected a link like ${pattern} on ${from}.`);
	return found.href;
}

async function links(page: Page, from: string, pattern: RegExp): Promise<{ href: string; text: string }[]> {
	await page.goto(from);
	const all = await page
		.locator('a[href]')
		.evaluateAll((anchors) => anchors.map((a) => ({ href: a.getAttribute('href') ?? '', text: a.textContent ?? '' })));
	return all.filter(({ href }) => pattern.test(href));
}

import type { APIRequestContext } from '@playwright/test';

/** Seeds that `endings.mjs` knows. */
export const NEVER_ENDS = 4_040_001;
export const BREAKS = 4_040_002;

type Found = { readonly id: string; readonly title: string };
type Contents = {
	readonly treeSets: readonly { readonly id: string; readonly kind?: string; readonly treeCount: number }[];
	readonly overlapRuns: readonly { readonly id: string }[];
};

/** What a script of the lead asks of the running site. */
export function byScript(request: APIRequestContext, token: string) {
	const headers = { authorization: `Bearer ${token}` };
	const ask = async <Answer>(path: string, data?: object): Promise<Answer> => {
		const url = `/api/v1${path}`;
		const answer = data === undefined ? await request.get(url, { headers }) : await request.post(url, { headers, data });
		if (!answer.ok()) throw new Error(`${path}: ${answer.status()} ${await answer.text()}`);
		return (await answer.json()) as Answer;
	};
	const newStudy = (title: string) => ask<Found>('/studies', { title });
	const addTree = (study: string, text: string) => ask<Found>(`/studies/${study}/tree-sets`, { label: 'Dated tree', text });
	const addMatrix = (study: string, csv: string) =>
		ask<Found>(`/studies/${study}/overlap-runs`, { label: 'D', measure: 'schoener-d', csv });

	/** Starts the main job of the example again, with another seed; answers the address of its page. */
	const startWith = async (study: string, seed: number): Promise<string> => {
		const { treeSets, overlapRuns } = await ask<Contents>(`/studies/${study}`);
		const treeSet = treeSets.find(({ treeCount }) => treeCount === 1)?.id;
		const plan = { treeSet, tree: 0, overlapRun: overlapRuns[0]?.id, permutations: 9_999, seed };
		const { id } = await ask<Found>(`/studies/${study}/analyses`, plan);
		return `/studies/${study}/analyses/${id}`;
	};
	return { newStudy, addTree, addMatrix, startWith };
}

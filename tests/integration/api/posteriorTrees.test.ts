import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { treeSetCreatedSchema } from '#lib/contracts/answers.ts';
import { startApiServer, type ApiServer } from './apiServer.ts';
import { clientOf, type Client } from './client.ts';
import { bringMaterials, finishedAnalysis, makeStudy, runAnalysis, TREE } from './materials.ts';

let server: ApiServer;
let client: Client;

beforeAll(async () => {
	server = await startApiServer();
	client = clientOf(server.origin, server.people.analyst);
});
afterAll(() => server.stop());

/** The worked example, its ages times a factor: neither r nor p heeds it. */
const scaled = (factor: number) => TREE.replace(/:([\d.]+)/g, (_, length) => `:${Number(length) * factor}`);
const sample = (count: number) =>
	`#NEXUS\nbegin trees;\n${Array.from({ length: count }, (_, i) => `tree STATE_${i * 1000} = ${scaled(i + 1)}`).join('\n')}\nend;`;

async function bringSample(count: number, choice: object = {}) {
	const materials = await bringMaterials(client, await makeStudy(client));
	const kept = await client.post(
		`/studies/${materials.study}/tree-sets`,
		{ label: 'Sample', text: sample(count), kind: 'posterior', ...choice },
		treeSetCreatedSchema
	);
	return { materials: { ...materials, treeSet: kept.id }, kept };
}

describe('a set of posterior trees', () => {
	// Worked example: slope -31/265 on the first tree, 2 of 24; on tree k the slope is 1/k of it.
	it('is tested over all of its trees unless the plan names one', async () => {
		const { materials } = await bringSample(4);
		const ran = await runAnalysis(client, materials, { seed: 1 });
		const { plan, result } = await finishedAnalysis(client, ran.analysis);
		expect(plan.tree).toBe('all');
		expect(result.permutation).toMatchObject({ exact: true, count: 24, asExtreme: 2, p: 2 / 24 });
		expect(result.trees).toMatchObject({ count: 4, inText: 4, shareBelow: 1, p: 2 / 24 });
		expect(result.trees?.slopes.mean).toBeCloseTo((-31 / 265) * ((1 + 1 / 2 + 1 / 3 + 1 / 4) / 4), 12);
		expect(result.regression.slope).toBeCloseTo(-31 / 265, 12);
		const one = await runAnalysis(client, materials, { seed: 1, tree: 2 });
		const alone = await finishedAnalysis(client, one.analysis);
		expect(alone.result.trees).toBeUndefined();
		expect(alone.result.finding.cautions.map(({ code }) => code)).toContain('posterior-ignored');
	});

	it('leaves out the burn-in, as a number or a share, and thins', async () => {
		const { materials, kept } = await bringSample(20, { burnIn: 0.25, thin: 5 });
		expect(kept).toMatchObject({ treeCount: 3 });
		const { result } = await finishedAnalysis(client, (await runAnalysis(client, materials, {})).analysis);
		expect(result.trees).toMatchObject({ count: 3, inText: 20, burnIn: 5, thin: 5 });
		// By hand: trees 6, 11 and 16 of the text, with roots at 4 times their number.
		expect(result.trees?.rootAge.quantiles.find(([p]) => p === 0.5)?.[1]).toBe(44);
		expect(result.compared.rootAge).toBe(24);
	});

	it('asks for the burn-in of what a sampler wrote, until it is told', async () => {
		const codes = async (choice: object) => (await bringSample(20, choice)).kept.remarks.map(({ code }) => code);
		expect(await codes({})).toContain('burn-in');
		expect(await codes({ burnIn: 0 })).not.toContain('burn-in');
	});

	it('is refused when a tree lacks a species, with its number', async () => {
		const study = await makeStudy(client);
		const { overlapRun } = await bringMaterials(client, study);
		const text = `${TREE}\n((Aa_one:1,Ab_two:1):1,'Ac three':2);`;
		const { id: treeSet } = await client.post(`/studies/${study}/tree-sets`, { label: 'Uneven', text }, treeSetCreatedSchema);
		const refused = await client.refusal(`/studies/${study}/analyses`, { body: { treeSet, overlapRun } });
		expect(refused).toMatchObject({ status: 422, code: 'tips-differ' });
		expect(refused.detail).toContain('tree 2 lacks “Ad four”');
	});
});

import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { analysisAnswerSchema, analysisStatusSchema, reportAnswerSchema } from '#lib/contracts/answers.ts';
import { startApiServer, type ApiServer } from './apiServer.ts';
import { clientOf, type Client } from './client.ts';
import { bringMaterials, finishedAnalysis, makeStudy, runAnalysis, untilOver, type Ran } from './materials.ts';

let server: ApiServer;
let client: Client;
let ran: Ran;

beforeAll(async () => {
	server = await startApiServer();
	client = clientOf(server.origin, server.people.analyst);
	ran = await runAnalysis(client, await bringMaterials(client, await makeStudy(client)), { seed: 7 });
});
afterAll(() => server.stop());

describe('analyses', () => {
	it('finishes with the numbers worked out by hand', async () => {
		const { result, plan, status, remarks } = await finishedAnalysis(client, ran.analysis);
		expect(status).toBe('finished');
		expect(plan).toMatchObject({
			tree: 0,
			species: 'shared',
			statistic: 'slope',
			permutations: 9999,
			seed: 7,
			alternative: 'less'
		});
		expect(result.regression.slope).toBeCloseTo(-31 / 265, 12);
		expect(result.regression.r).toBeCloseTo(-0.952157431093, 11);
		expect(result.permutation).toMatchObject({ exact: true, count: 24, asExtreme: 2, interval: null });
		expect(result.permutation.p).toBeCloseTo(2 / 24, 12);
		expect(result.permutation.withinDeepestSplit?.pLess).toBeCloseTo(2 / 6, 12);
		expect(remarks).toEqual(result.remarks);
	});

	it('answers an equal plan with the analysis it has', async () => {
		const { study, treeSet, overlapRun } = ran;
		const again = await client.fetch(`/studies/${study}/analyses`, { body: { treeSet, overlapRun, seed: 7, alpha: 0.05 } });
		expect(again.status).toBe(200);
		expect(await again.json()).toMatchObject({ id: ran.analysis, status: 'finished' });
	});

	it('makes a new one without a seed, and for another choice', async () => {
		const { study, treeSet, overlapRun } = ran;
		for (const choice of [{}, {}, { seed: 8 }, { seed: 7, alternative: 'greater' }]) {
			const response = await client.fetch(`/studies/${study}/analyses`, { body: { treeSet, overlapRun, ...choice } });
			expect(response.status).toBe(202);
			const { id } = z.object({ id: z.string() }).parse(await response.json());
			expect(id).not.toBe(ran.analysis);
			await untilOver(client, id);
		}
	});

	it('makes one of two equal plans sent at once', async () => {
		const { study, treeSet, overlapRun } = ran;
		const send = async () => {
			const response = await client.fetch(`/studies/${study}/analyses`, { body: { treeSet, overlapRun, seed: 99 } });
			return z.object({ id: z.string() }).parse(await response.json()).id;
		};
		const ids = await Promise.all([send(), send(), send()]);
		expect(new Set(ids).size).toBe(1);
		await untilOver(client, ids[0] ?? '');
	});

	it('stops, and runs a stopped plan again under the same id', async () => {
		const { study, treeSet, overlapRun } = ran;
		const plan = { treeSet, overlapRun, seed: 1234 };
		const started = await client.fetch(`/studies/${study}/analyses`, { body: plan });
		const { id } = z.object({ id: z.string() }).parse(await started.json());
		const stopped = await client.fetch(`/analyses/${id}/stop`, { method: 'POST' });
		const { status } = analysisStatusSchema.parse(await stopped.json());
		// four species are so quick that it may have finished first; then stopping changes nothing
		expect(['stopped', 'finished']).toContain(status);
		const again = await client.fetch(`/studies/${study}/analyses`, { body: plan });
		expect(again.status).toBe(status === 'stopped' ? 202 : 200);
		expect(await again.json()).toMatchObject({ id });
		expect(await untilOver(client, id)).toContain('event: finished');
		expect((await client.get(`/analyses/${id}`, analysisAnswerSchema)).status).toBe('finished');
	});

	it('tells in events how an analysis ended, also afterwards', async () => {
		const response = await client.fetch(`/analyses/${ran.analysis}/events`);
		expect(response.headers.get('content-type')).toBe('text/event-stream');
		expect(await response.text()).toContain('event: finished\n');
	});

	it('tells that the matrix was read through the API before the plan was written', async () => {
		const materials = await bringMaterials(client, await makeStudy(client));
		const before = await finishedAnalysis(client, (await runAnalysis(client, materials, { seed: 1 })).analysis);
		expect(before.seenBefore).toMatchObject({ opened: null, analysedBefore: 0 });
		await client.get(`/overlap-runs/${materials.overlapRun}`, z.unknown());
		const after = await finishedAnalysis(client, (await runAnalysis(client, materials, { seed: 2 })).analysis);
		expect(after.seenBefore).toMatchObject({ opened: { by: 'script' }, analysedBefore: 1 });
	});

	it('says when names have changed since', async () => {
		const other = await runAnalysis(client, await bringMaterials(client, await makeStudy(client)));
		const before = await client.get(`/analyses/${other.analysis}`, analysisAnswerSchema);
		expect(before.outOfDate).toEqual([]);
		await client.fetch(`/studies/${other.study}/names`, { method: 'PUT', body: { decisions: [{ from: 'Aa one', to: null }] } });
		const after = await client.get(`/analyses/${other.analysis}`, analysisAnswerSchema);
		expect(after.outOfDate.map(({ code }) => code)).toEqual(['names-changed']);
	});
});

describe('exports', () => {
	it('draws the plate as svg, pdf and png', async () => {
		const starts = { svg: '<svg', pdf: '%PDF', png: '\x89PNG' };
		for (const [format, start] of Object.entries(starts)) {
			const response = await client.fetch(`/analyses/${ran.analysis}/plate.${format}?width=84&dpi=150&age=right`);
			expect(response.status, format).toBe(200);
			const bytes = Buffer.from(await response.arrayBuffer());
			expect(bytes.subarray(0, 4).toString('latin1'), format).toBe(start);
		}
		const svg = await (await client.fetch(`/analyses/${ran.analysis}/plate.svg?width=84`)).text();
		expect(svg).toContain('width="84mm"');
	});

	it('refuses a width or format it does not have', async () => {
		expect(await client.refusal(`/analyses/${ran.analysis}/plate.svg?width=5`)).toMatchObject({ status: 400 });
		expect(await client.refusal(`/analyses/${ran.analysis}/plate.svg?colour=red`)).toMatchObject({ status: 400 });
		expect(await client.refusal(`/analyses/${ran.analysis}/plate.gif`)).toMatchObject({ status: 404 });
	});

	it('lists pairs and nodes', async () => {
		const pairs = await (await client.fetch(`/analyses/${ran.analysis}/pairs.csv`)).text();
		// by hand: tree order A, B, C, D
		expect(pairs).toBe(
			[
				'species_a,species_b,age,overlap',
				'Aa one,Ab two,1,0.8',
				'Aa one,Ac three,2,0.7',
				'Ab two,Ac three,2,0.6',
				'Aa one,Ad four,4,0.4',
				'Ab two,Ad four,4,0.4',
				'Ac three,Ad four,4,0.5',
				''
			].join('\r\n')
		);
		const nodes = (await (await client.fetch(`/analyses/${ran.analysis}/nodes.csv`)).text()).trim().split('\r\n');
		expect(nodes[0]).toBe('node,age,tips,pairs,nested,plain');
		// by hand: root, ABC, AB; nested 9/20, 13/20, 4/5; plain 13/30, 13/20, 4/5
		const numbers = nodes.slice(1).map((line) => line.split(',').map(Number));
		const byAge = numbers.sort((a, b) => (b[1] ?? 0) - (a[1] ?? 0)).map(([, ...row]) => row);
		const expected = [[4, 4, 3, 9 / 20, 13 / 30], [2, 3, 2, 13 / 20, 13 / 20], [1, 2, 1, 0.8, 0.8]]; // prettier-ignore
		for (const [i, row] of expected.entries())
			for (const [j, value] of row.entries()) expect(byAge[i]?.[j]).toBeCloseTo(value, 12);
	});

	it('saves a report and prints it', async () => {
		const body = { title: 'Überlappung and age', notes: 'Checked by hand.' };
		const report = await client.post(`/analyses/${ran.analysis}/reports`, body, reportAnswerSchema);
		expect(report).toMatchObject({ analysis: ran.analysis, ...body });
		expect(report.caption).toContain('4 species');
		const printed = await client.fetch(`/analyses/${ran.analysis}/report.pdf`);
		expect(printed.headers.get('content-type')).toBe('application/pdf');
		expect(
			Buffer.from(await printed.arrayBuffer())
				.subarray(0, 5)
				.toString()
		).toBe('%PDF-');
		expect(await client.refusal(`/analyses/${ran.analysis}/report.pdf?report=other`)).toMatchObject({ status: 404 });
	});
});

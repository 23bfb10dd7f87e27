import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { drawnInputs } from '#lib/analysis/drawnInputs.fixture.ts';
import { microPlan } from '#lib/analysis/microResult.fixture.ts';
import { shareOut } from '#lib/analysis/shareOut.ts';
import type { AnalysisProgress } from '#lib/contracts/analysisResult.ts';
import { compute } from '#lib/server/jobs/pool.ts';
import { shareAnalysis } from '#lib/server/jobs/shareAnalysis.ts';
import { openTestRuntime, type TestRuntime } from './support/openTestRuntime.ts';

const SPECIES = 40;
const inputs = drawnInputs(SPECIES);
const plan = microPlan({ permutations: 499_999, seed: 11 });
let open: TestRuntime | null = null;

beforeAll(async () => {
	open = await openTestRuntime({ workers: 2 });
});
afterAll(() => open?.close());

describe('shareAnalysis', () => {
	it('gives the result of one thread, and progress that only rises', async () => {
		expect(shareOut(plan, SPECIES, 2)).toHaveLength(2);
		const told: AnalysisProgress[] = [];
		const signal = new AbortController().signal;
		const result = await shareAnalysis({ inputs, plan }, { signal, onProgress: (progress) => told.push(progress) });
		expect(result).toEqual(await compute('analyse', { inputs, plan }));
		const done = told.map((progress) => progress.done);
		expect(done).toEqual([...done].sort((a, b) => a - b));
		expect(told.every(({ total }) => total === told[0]?.total)).toBe(true);
		// At first 256 shuffles of one share; p over all of them in the end.
		expect(done[0]).toBeLessThan(1000);
		expect(told.at(-1)).toMatchObject({ p: result.permutation.p, asExtreme: result.permutation.asExtreme });
	});

	it('ends every share when it is stopped', async () => {
		const stop = new AbortController();
		const run = shareAnalysis({ inputs, plan }, { signal: stop.signal, onProgress: () => stop.abort() });
		await expect(run).rejects.toThrow(expect.objectContaining({ name: 'AbortError' }));
	});

	it('keeps the sentence of a refusal', async () => {
		const star = { ...inputs, treeText: `(${inputs.overlap.species.map((name) => `${name}:1`).join(',')});` };
		const run = shareAnalysis({ inputs: star, plan }, { signal: new AbortController().signal, onProgress: () => undefined });
		await expect(run).rejects.toThrow(/a star/);
	});
});

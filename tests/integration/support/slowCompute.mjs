/** A compute thread that does nothing, slowly: one step of 20 ms for each permutation asked for. */
import { setTimeout as pause } from 'node:timers/promises';

export default async function answer({ argument, port }) {
	const total = argument.plan.permutations;
	if (argument.inputs.treeText === 'refuse')
		return { ok: false, refusal: { code: 'too-few-species', message: 'Expected 4 species; got 3.' } };
	if (argument.inputs.treeText === 'break') throw new Error('a defect with a secret in it');
	for (let done = 1; done <= total; done += 1) {
		await pause(20);
		const numbers = { p: 1, asExtreme: 0, monteCarloStandardError: 0, slope: 0, meanAge: 0, meanOverlap: 0 };
		port?.postMessage({ done, total, ...numbers, newSlopes: [done] });
	}
	return { ok: true, value: { steps: total } };
}

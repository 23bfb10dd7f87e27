import { remark, type Remark } from '#lib/remarks/remark.ts';

/** So few trees are no output of a sampler, whatever they are called. */
const FEWEST = 20;
/** Trees called after the step of a sampler: STATE_0, gen.1000, rep_2000; an unquoted underscore is read as a blank. */
const STEP = /^(?:state|gen|rep|iteration)[._ ]?(\d+)$/i;

/**
 * A look at trees that a sampler wrote from its first step on: the steps before it settled, its burn-in, are still there.
 * Null for few trees, other names, or a first step above 0, which tells that the beginning was left out already.
 *
 * @param names - of the trees, in the order of the text
 */
export function rawSampleRemark(names: readonly string[]): Remark | null {
	if (names.length < FEWEST) return null;
	const steps = names.map((name) => STEP.exec(name)?.[1]);
	if (steps.some((step) => step === undefined) || Number(steps[0]) !== 0) return null;
	const message =
		`The ${names.length.toLocaleString('en')} trees are called “${names[0]}” to “${names.at(-1)}”, as a sampler writes them from its first step on. ` +
		'All are used. Say how many to leave out at the start (burn-in), or 0 when none.';
	return remark('look', 'burn-in', message);
}

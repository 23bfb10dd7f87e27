import type { Group } from './arrangements.ts';
import type { Functional } from './functionals.ts';
import { formsPart } from './formsPart.ts';
import { kernelRegions, type KernelRegions } from './kernelRegions.ts';
import { nodesPart } from './nodesPart.ts';
import type { PermutationDesign } from './permutationDesign.ts';

/** The values of one functional, somewhere in the kernel's memory; valid until the kernel is next used. */
export type ValueColumn = {
	readonly functional: Functional;
	/** how far a value may be from that of the plain loop on the overlaps as they are */
	readonly slack: number;
	readonly values: Float64Array;
	readonly from: number;
	readonly step: number;
};

/** One way to evaluate some functionals: what it needs in the kernel's memory, and its run over the arrangements there. */
export type KernelPart = {
	readonly parts: Readonly<Record<string, Float64Array | Int32Array | number>>;
	readonly evaluate: (regions: KernelRegions<string>, count: number) => readonly ValueColumn[];
};

export type ArrangementValues = {
	/** draws the shuffles of a chunk, from the identity on */
	readonly draw: (stream: { readonly domain: number; readonly seed: number; readonly chunk: number }, count: number) => void;
	/** takes given arrangements, shape (count, n) */
	readonly take: (arrangements: Int32Array) => void;
	/** of the arrangements drawn or taken last */
	readonly columns: (count: number) => readonly ValueColumn[];
	/** one of these arrangements, shape (n,); fresh */
	readonly arrangement: (index: number) => Int32Array;
};

export type ValuesAsked = {
	readonly functionals: readonly Functional[];
	readonly groups: readonly Group[];
	/** arrangements that are in the kernel's memory at once */
	readonly capacity: number;
};

/**
 * Evaluates functionals of a design by the compiled kernel, on arrangements that never leave its memory. Where nested
 * averages are among them every pair is visited anyway, and gives its node's plain sum too; else the plain ones take
 * the shorter way of `blockFormLayout`. Ranks always do.
 */
export function arrangementValues(design: PermutationDesign, asked: ValuesAsked): ArrangementValues {
	const { functionals, groups, capacity } = asked;
	const byNodes = functionals.some(({ source }) => source === 'nested');
	const ofOverlaps = functionals.filter(({ source }) => source !== 'ranks');
	const ofRanks = functionals.filter(({ source }) => source === 'ranks');
	const ways: KernelPart[] = [];
	if (byNodes) ways.push(nodesPart(design, ofOverlaps, capacity));
	else if (ofOverlaps.length > 0) ways.push(formsPart(design, ofOverlaps, capacity));
	if (ofRanks.length > 0) ways.push(formsPart(design, ofRanks, capacity));

	const { tipCount } = design;
	const regions = kernelRegions<string>({
		...Object.assign({}, ...ways.map(({ parts }) => parts)),
		arrangements: 4 * capacity * tipCount,
		groups: Int32Array.from(groups.flatMap(({ from, to }) => [from, to])),
		offsets: 4 * tipCount
	});
	return {
		draw: ({ domain, seed, chunk }, count) => {
			const { address } = regions;
			// The fields of ShuffleTask in src/kernel.
			const task = [address('arrangements'), count, tipCount, address('groups'), groups.length, domain, seed, chunk];
			regions.run('shuffles', task);
		},
		take: (arrangements) => regions.integers('arrangements', arrangements.length).set(arrangements),
		columns: (count) => ways.flatMap(({ evaluate }) => evaluate(regions, count)),
		arrangement: (index) =>
			regions.integers('arrangements', (index + 1) * tipCount).slice(index * tipCount, (index + 1) * tipCount)
	};
}

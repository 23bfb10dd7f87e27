import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { AgeUnit } from '#lib/contracts/materials.ts';
import type { Measure } from '#lib/contracts/measure.ts';
import type { Alternative } from '#lib/contracts/plan.ts';
import type { TreeAbout } from '#lib/contracts/treeAbout.ts';
import type { PowerBlock, SignalBlock, TreesBlock } from '#lib/contracts/resultBlocks.ts';

/** What the words of a finding are chosen from: numbers already computed, and the plan's question. */
export type FindingFacts = {
	readonly measure: Measure;
	readonly ageUnit: AgeUnit;
	readonly alpha: number;
	readonly alternative: Alternative;
	readonly species: number;
	readonly pairs: number;
	readonly slope: number;
	readonly r: number;
	readonly meanOverlap: number;
	readonly rootAge: number;
	/** ages of the internal nodes, unit of the tree set */
	readonly nodeAges: readonly number[];
	readonly permutation: AnalysisResult['permutation'];
	/** p of the same tail from the three moments, null where the approximation does not apply */
	readonly momentP: number | null;
	readonly transformed: boolean;
	readonly polytomies: number;
	/** trees of the set, used or not */
	readonly treesInSet?: number;
	/** when the test averages over all of them */
	readonly trees?: TreesBlock | undefined;
	/** what the author of the tree has told; absent where nobody was asked */
	readonly about?: TreeAbout;
	/** signal in niche positions and what goes with them, when the plan asked for it */
	readonly signal?: SignalBlock | undefined;
	/** what this tree could have shown, when it was simulated */
	readonly power?: PowerBlock | undefined;
};

import type { AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { BlockContext } from './blockContext.ts';
import { cladesBlock } from './cladesBlock.ts';
import { covariatesBlock } from './covariatesBlock.ts';
import { ageClassesBlock, fallBlock, influenceBlock } from './curvesBlock.ts';
import { powerBlock } from './powerBlock.ts';
import { signalBlock } from './signalBlock.ts';
import { sistersBlock } from './sistersBlock.ts';

/** The parts of a result beyond the test itself: each is there when the plan asks for it or the data allow it. */
export type ResultBlocks = Partial<AnalysisResult>;

type Block = (context: BlockContext) => ResultBlocks;

/** One entry a block, in the order of the findings page. A block that was not asked for returns an empty object. */
const BLOCKS: readonly Block[] = [
	covariatesBlock,
	cladesBlock,
	sistersBlock,
	signalBlock,
	ageClassesBlock,
	fallBlock,
	influenceBlock,
	powerBlock
];

export function resultBlocks(context: BlockContext): ResultBlocks {
	return Object.assign({}, ...BLOCKS.map((block) => block(context)));
}

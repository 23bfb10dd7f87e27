import type { CovariateKind, CovariateReadingNotes, CovariateRequest, CovariateScale } from './covariates.ts';
import type { NicheTableRequest } from './nicheTables.ts';
import type { NicheTable } from '#lib/overlap/nicheTable.ts';
import type { MatrixReading } from '#lib/overlap/matrixReading.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import type { SharedTallies } from '#lib/statistics/permutationTest.ts';
import type { ChunkShare } from '#lib/statistics/shuffleBatches.ts';
import type { AnalysisProgress, AnalysisResult } from './analysisResult.ts';
import type { Plan } from './plan.ts';
import type { PowerBlock } from './resultBlocks.ts';
import type { AgeUnit, Confirm, OverlapRunRequest } from './materials.ts';
import type { TreeAbout } from './treeAbout.ts';
import type { Measure } from './measure.ts';

/** Everything an analysis runs on. Plain data: it crosses a thread boundary. */
export type AnalysisInputs = {
	/** the tree set's text as given */
	readonly treeText: string;
	readonly ageUnit: AgeUnit;
	/** the person accepted that tips be levelled by extending terminal branches */
	readonly spreadConfirmed: boolean;
	/** which trees of the text a plan on all of them uses: after `burnIn`, every `thin`-th; every one unless told otherwise */
	readonly chosen?: { readonly burnIn: number; readonly thin: number };
	/** what only the author of the tree knows */
	readonly about?: TreeAbout;
	readonly measure: Measure;
	readonly overlap: {
		readonly species: readonly string[];
		/** strict lower triangle, row by row: (1,0), (2,0), (2,1), …; NaN where a pair is missing */
		readonly lower: Float64Array;
		/** remarks of the run; an open `settle` refuses the analysis */
		readonly remarks: readonly Remark[];
	};
	readonly decisions: readonly { readonly from: string; readonly to: string | null; readonly why?: string }[];
	/** what the plan allows for, in its order */
	readonly covariates?: readonly CovariateInput[];
	/** niche positions and what goes with them, when the plan asks for their signal */
	readonly niches?: { readonly label: string } & Pick<NicheTable, 'species' | 'variables'>;
};

/** A covariate as it was read: values as they stand. */
export type CovariateReading = {
	readonly species: readonly string[];
	/** strict lower triangle, row by row; NaN where a pair is missing */
	readonly lower: Float64Array;
	readonly reading: CovariateReadingNotes;
	readonly remarks: readonly Remark[];
};

/** A covariate of a plan, ready to be allowed for. */
export type CovariateInput = Pick<CovariateReading, 'species' | 'lower' | 'remarks'> & {
	readonly label: string;
	readonly kind: CovariateKind;
	readonly scale: CovariateScale;
};

/** What is known of one tree of a set without its whole structure. */
export type TreeFacts = {
	readonly name: string;
	readonly tips: readonly string[];
	readonly rootAge: number | null;
	/** relative spread of root-to-tip distances; null with missing lengths */
	readonly ultrametricSpread: number | null;
	readonly polytomies: number;
	readonly remarks: readonly Remark[];
};

export type TreeReading = {
	readonly format: 'newick' | 'nexus';
	readonly trees: readonly TreeFacts[];
	readonly remarks: readonly Remark[];
};

/** One tree to draw or to serve: preorder, ages in the unit of the set. */
export type TreeStructure = {
	readonly parent: readonly number[];
	readonly age: readonly number[];
	readonly label: readonly string[];
	/** tips below each node */
	readonly tips: readonly number[];
	/** names of the tips in tree order */
	readonly tipNames: readonly string[];
};

/** What an analysis would use, found before it runs. */
export type AnalysisPreview = {
	readonly species: readonly string[];
	readonly dropped: readonly { readonly name: string; readonly in: 'tree' | 'data'; readonly why: string }[];
	readonly pairs: number;
	readonly distinctAges: number;
	readonly rootAge: number;
	/** species on each side of the root of the pruned tree */
	readonly sides: readonly number[];
	readonly rootPairShare: number;
	readonly smallestP: number;
	readonly exact: boolean;
	/** trees that are averaged over, and the share that has the commonest root split; only for a plan on all trees of a set */
	readonly trees?: { readonly count: number; readonly splitShare: number };
	/** a small side of the root that holds many of the pairs, and the species that would remain without it */
	readonly outgroup: { readonly species: readonly string[]; readonly rest: readonly string[] } | null;
	readonly remarks: readonly Remark[];
};

/** Tasks of the compute threads: one entry a task, argument and answer. */
export type ComputeTasks = {
	readTrees: { argument: { text: string; confirm?: Confirm }; answer: TreeReading };
	/** either `csv` or `matrix` */
	readMatrix: { argument: Pick<OverlapRunRequest, 'measure' | 'confirm' | 'csv' | 'matrix'>; answer: MatrixReading };
	readCovariate: { argument: Omit<CovariateRequest, 'label'>; answer: CovariateReading };
	readNicheTable: { argument: Pick<NicheTableRequest, 'csv' | 'roles'>; answer: NicheTable };
	treeStructure: { argument: { text: string; tree: number; spreadConfirmed: boolean }; answer: TreeStructure };
	mrcaAges: {
		argument: { text: string; tree: number; spreadConfirmed: boolean; species?: readonly string[] };
		/** values row-major, shape (n, n) */
		answer: { species: readonly string[]; values: Float64Array };
	};
	preview: { argument: { inputs: AnalysisInputs; plan: Plan }; answer: AnalysisPreview };
	/** what the plan could detect on its tree; null at a level that simulations cannot reach */
	planPower: { argument: { inputs: AnalysisInputs; plan: Plan }; answer: PowerBlock | null };
	/** some chunks of the shuffles of an analysis that several threads share */
	analyseShare: { argument: { inputs: AnalysisInputs; plan: Plan; share: ChunkShare }; answer: SharedTallies };
	/** with the shares of its shuffles where others have run them */
	analyse: { argument: { inputs: AnalysisInputs; plan: Plan; shares?: readonly SharedTallies[] }; answer: AnalysisResult };
};
export type ComputeTask = keyof ComputeTasks;

/** What the thread posts on the progress port while `analyse` or `analyseShare` runs. */
export type ComputeProgress = AnalysisProgress & {
	/** of a share: its own shuffles of the plan's question, from which p over all shares is made */
	readonly share?: { readonly done: number; readonly less: number; readonly greater: number };
};

/** An InputError that crossed a thread boundary. */
export type ComputeRefusal = {
	readonly code: string;
	readonly message: string;
	readonly where?: Remark['where'];
	readonly remarks?: readonly Remark[];
};

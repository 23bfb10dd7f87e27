import type { AnalysisProgress, AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { AnalysisInputs } from '#lib/contracts/compute.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import type { Access } from '#lib/server/access.ts';

/** The sentence a refused or failed run leaves; `reference` leads to the log when the fault is ours. */
export type AnalysisFailure = { code: string; message: string; reference?: string };

/** What a worker needs of the repository of analyses. Each mark holds only while the analysis is still working. */
export type AnalysisStore = {
	readonly inputsOf: (access: Access, id: string) => Promise<{ readonly inputs: AnalysisInputs; readonly plan: Plan }>;
	/** from waiting to working; false when somebody else has it, or nobody wants it any more */
	readonly markWorking: (access: Access, id: string) => Promise<boolean>;
	readonly saveProgress: (access: Access, id: string, progress: AnalysisProgress) => Promise<unknown>;
	readonly markFinished: (access: Access, id: string, result: AnalysisResult) => Promise<unknown>;
	readonly markFailed: (access: Access, id: string, failure: AnalysisFailure) => Promise<unknown>;
	/** from waiting or working to stopped */
	readonly markStopped: (access: Access, id: string) => Promise<unknown>;
};

/** Numbers of shuffles that make p a round fraction: alpha times one more is whole for the usual alphas. */
const STEPS = [999, 9_999, 99_999, 999_999] as const;

/** A Monte Carlo p-value as the result of an analysis states it. */
export type DrawnP = {
	readonly exact: boolean;
	/** m */
	readonly count: number;
	/** shuffles at least as extreme, in the tail asked */
	readonly asExtreme: number;
	/** 95 % Clopper-Pearson interval of p; null when exact */
	readonly interval: readonly [number, number] | null;
};

/**
 * How many shuffles would settle what these left open: no shuffle was as extreme, so p sits at its floor of 1/(m + 1);
 * or the interval of p holds alpha, so the draw could have fallen on either side. A proposal: the number of a plan is
 * never changed in silence, and more shuffles until p pleases would be a choice by result.
 *
 * @param alpha - the level that the plan declared
 * @returns the next of 999, 9,999, 99,999 and 999,999; null where nothing is open, or nothing larger is offered
 */
export function moreShuffles({ exact, count, asExtreme, interval }: DrawnP, alpha: number): number | null {
	if (exact || interval === null) return null;
	const isAtFloor = asExtreme === 0;
	const isUndecided = interval[0] <= alpha && alpha <= interval[1];
	if (!isAtFloor && !isUndecided) return null;
	return STEPS.find((step) => step > count) ?? null;
}

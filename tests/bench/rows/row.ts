import { median } from 'simple-statistics';

export type Row = { readonly work: string; readonly against: string; readonly measured: string; readonly wanted: string };

/** CPU milliseconds of this thread for one call. */
export function cpuTime(work: () => void): number {
	const before = process.cpuUsage();
	work();
	const { user, system } = process.cpuUsage(before);
	return (user + system) / 1000;
}

type Side = () => number | Promise<number>;

/**
 * Runs both sides in turns, the order turned round each time, and returns the median of the ratios of neighbours,
 * second over first. The first round warms up and is not counted.
 */
export async function pairedRatio(first: Side, second: Side, rounds: number): Promise<number> {
	const ratios: number[] = [];
	for (let round = 0; round <= rounds; round++) {
		const isTurned = round % 2 === 1;
		const early = await (isTurned ? second : first)();
		const late = await (isTurned ? first : second)();
		if (round > 0) ratios.push(isTurned ? early / late : late / early);
	}
	return median(ratios);
}

export const SPECIES = 200;
export const SHUFFLES = 9_999;

/**
 * The smallest p that a group of `size` out of `count` species can have when they change places freely: only membership
 * matters, so 1 / C(count, size). It underflows to 0 for large groups, which only a number of shuffles then bounds.
 */
export function smallestMembershipP(count: number, size: number): number {
	let ways = 1;
	for (let k = 1; k <= Math.min(size, count - size); k++) ways = (ways * (count - k + 1)) / k;
	return 1 / ways;
}

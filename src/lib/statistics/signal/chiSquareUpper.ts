import { incompleteGamma } from '../specialFunctions.ts';

/**
 * Upper tail of χ²: P(X >= x) = Q(degrees / 2, x / 2).
 *
 * @param x - >= 0
 * @see NIST DLMF 8.2.4
 */
export function chiSquareUpper(x: number, degrees: number): number {
	return incompleteGamma(degrees / 2, x / 2).upper;
}

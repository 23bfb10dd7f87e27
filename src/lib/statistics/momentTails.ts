import { incompleteGamma } from './specialFunctions.ts';

/** Below this skewness the gamma curve and the normal curve agree to about 1e-5, and the gamma series grows long. */
const LEAST_SKEWNESS = 1e-4;

/**
 * P(Z <= z) of a standard normal variable. Its upper tail is `normalTail(-z)`, without loss of digits.
 * @see NIST DLMF 7.11.2: erfc as an incomplete gamma function
 */
export function normalTail(z: number): number {
	const { lower, upper } = incompleteGamma(0.5, (z * z) / 2);
	return z <= 0 ? upper / 2 : (1 + lower) / 2;
}

/**
 * P(Z <= z) of a Pearson type III variable with mean 0, variance 1 and the given skewness: a shifted gamma curve. The
 * upper tail is `pearsonThreeTail(-z, -skewness)`. A cross-check of the sampler, never a headline: with few species the
 * null is too lumpy for any curve.
 *
 * @see Mielke & Berry (2007), doi:10.1007/978-0-387-69813-7, for its use in permutation tests
 */
export function pearsonThreeTail(z: number, skewness: number): number {
	if (Math.abs(skewness) < LEAST_SKEWNESS) return normalTail(z);
	const shape = 4 / (skewness * skewness);
	const tails = incompleteGamma(shape, shape + Math.sign(skewness) * z * Math.sqrt(shape));
	return skewness > 0 ? tails.lower : tails.upper;
}

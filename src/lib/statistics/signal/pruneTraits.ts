import { InputError } from '#lib/remarks/inputError.ts';
import type { TraitTree } from './traitTree.ts';

/** What one pass from the tips to the root finds out about a trait. With V the covariance of the tips per unit of rate: */
export type PrunedTraits = {
	/** generalised least-squares mean, (1'V⁻¹x) / (1'V⁻¹1); unit of the trait */
	readonly rootMean: number;
	/** 1 / (1'V⁻¹1) */
	readonly rootVariance: number;
	/** ln |V| */
	readonly logDeterminant: number;
	/** (x − mean)'V⁻¹(x − mean) */
	readonly quadratic: number;
};

export type PruneOptions = {
	/** multiplies every branch; 1 when not given */
	readonly rate?: number;
	/** shape (tips,); variance of each species' value that is no evolution, such as a squared standard error */
	readonly noise?: Float64Array;
	/** told each independent contrast, (x − y) and its variance, from the tips to the root */
	readonly onContrast?: (difference: number, variance: number) => void;
};

/**
 * Reads a trait along the tree by pruning: O(n), no matrix is built or inverted. A polytomy is read as branches of
 * length zero in any order, which leaves every returned number as it is.
 *
 * @param x - shape (tips,), in tree order
 * @throws {InputError} `zero-length-tips` when two species have no branch and no error between them
 * @see Felsenstein (1973) Am. J. Hum. Genet. 25:471; (1985), doi:10.1086/284325
 */
export function pruneTraits(
	{ parent, edges, tips }: TraitTree,
	x: ArrayLike<number>,
	{ rate = 1, noise, onContrast }: PruneOptions = {}
): PrunedTraits {
	const value = new Float64Array(parent.length);
	// Variance of the value at the node; below zero while no child has brought one.
	const variance = new Float64Array(parent.length).fill(-1);
	for (let position = 0; position < tips.length; position++) {
		const tip = tips[position] ?? 0;
		value[tip] = x[position] ?? Number.NaN;
		variance[tip] = noise?.[position] ?? 0;
	}
	let logDeterminant = 0;
	let quadratic = 0;
	for (let node = parent.length - 1; node > 0; node--) {
		const above = parent[node] ?? 0;
		const arriving = (variance[node] ?? 0) + rate * (edges[node] ?? 0);
		const standing = variance[above] ?? 0;
		if (standing < 0) {
			value[above] = value[node] ?? 0;
			variance[above] = arriving;
			continue;
		}
		const apart = standing + arriving;
		if (!(apart > 0)) throw zeroLength();
		const difference = (value[node] ?? 0) - (value[above] ?? 0);
		logDeterminant += Math.log(apart);
		quadratic += (difference * difference) / apart;
		onContrast?.(difference, apart);
		value[above] = (value[above] ?? 0) + (difference * standing) / apart;
		variance[above] = (standing * arriving) / apart;
	}
	const rootVariance = variance[0] ?? 0;
	if (!(rootVariance > 0)) throw zeroLength();
	return { rootMean: value[0] ?? 0, rootVariance, logDeterminant: logDeterminant + Math.log(rootVariance), quadratic };
}

function zeroLength(): InputError {
	return new InputError(
		'zero-length-tips',
		'Two species have no branch between them, so a trait cannot differ there under a random walk. Leave one of them out, or give standard errors.'
	);
}

/** Independent contrasts, each divided by its standard deviation; n − 1 of them, from the tips to the root, sign arbitrary. */
export function independentContrasts(tree: TraitTree, x: ArrayLike<number>): number[] {
	const contrasts: number[] = [];
	pruneTraits(tree, x, { onContrast: (difference, variance) => contrasts.push(difference / Math.sqrt(variance)) });
	return contrasts;
}

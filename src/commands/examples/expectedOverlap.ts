export type ExpectedOverlap = { readonly ageMa: number; readonly theta: number; readonly d: number; readonly i: number };

/**
 * Mean D and I of two species by the age of their common ancestor, for round Gaussian niches of one width on two climates whose
 * centres walk at random, where every climate is equally common. With theta = v t / (2 s²) on each climate:
 * E[I] = 1 / (1 + theta), and D = 2 Phi(-M / 2) with M² = 4 theta × chi-square(2) gives E[D] = 1 - sqrt(theta / (1 + theta)).
 */
export function expectedOverlap(ageMa: number, variancePerMyr: number, width: number): ExpectedOverlap {
	const theta = (variancePerMyr * ageMa) / (2 * width * width);
	return { ageMa, theta, d: 1 - Math.sqrt(theta / (1 + theta)), i: 1 / (1 + theta) };
}

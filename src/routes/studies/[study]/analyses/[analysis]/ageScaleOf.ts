import type { Findings } from './findingsView.ts';

/** How the ages of a result are written, and the youngest of them that pairs have. */
export function ageScaleOf({ compared, plate }: Pick<Findings, 'compared' | 'plate'>) {
	const inner = new Set(plate.tree.parent);
	const ages = plate.tree.age.filter((_, node) => inner.has(node));
	return { ageUnit: compared.ageUnit, rootAge: compared.rootAge, youngestAge: Math.min(...ages) };
}

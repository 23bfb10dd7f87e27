import type { AgeUnit } from '#lib/contracts/materials.ts';

type UnitWords = {
	/** a date: “18.4 Ma” */
	readonly date: string;
	/** what a slope is counted in: “per Myr” */
	readonly per: string;
	/** in a sentence: “for each million years since common ancestry” */
	readonly forEach: string;
};

const WORDS: Readonly<Record<AgeUnit, UnitWords>> = {
	Ma: { date: 'Ma', per: 'per Myr', forEach: 'for each million years since common ancestry' },
	ka: { date: 'ka', per: 'per kyr', forEach: 'for each thousand years since common ancestry' },
	relative: { date: 'units of relative age', per: 'per unit of relative age', forEach: 'for each unit of relative age' }
};

export function unitWords(unit: AgeUnit): UnitWords {
	return WORDS[unit];
}

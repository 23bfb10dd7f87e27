import { countSlope, mantelCase } from './mantelCase.ts';
import { cpuTime, type Row } from './row.ts';
import { median } from 'simple-statistics';

const SIZES = [125, 250, 500, 1_000] as const;
const ROUNDS = 7;
/** Pairs visited in one measurement of any size, so that each takes about as long. */
const WORK = 1_000_000_000;

/** Time per pair and shuffle at 1,000 species over that at 125: 1 were n² exactly. */
export function growth(): Row {
	const cases = SIZES.map((n) => ({
		n,
		design: mantelCase(n).design,
		shuffles: Math.ceil(WORK / (n * n)),
		times: [] as number[]
	}));
	for (let round = 0; round <= ROUNDS; round++) {
		for (const { design, shuffles, times } of cases) {
			const time = cpuTime(() => countSlope({ design, shuffles, seed: round })) / shuffles;
			if (round > 0) times.push(time);
		}
	}
	const perPair = cases.map(({ n, times }) => median(times) / (n * n));
	const [first = 1] = perPair;
	return {
		work: `Mantel test of ${SIZES.join(', ')} species`,
		against: 'n²',
		measured: `${perPair.map((time) => (time / first).toFixed(2)).join(', ')} × n²`,
		wanted: 'at most 1.5 × n²'
	};
}

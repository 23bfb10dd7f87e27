import { formatFixed, formatSlope } from '#lib/analysis/words/numbers.ts';
import { unitWords } from '#lib/analysis/words/units.ts';
import { plateModel } from '#lib/figures/plateModel.ts';
import { spanName } from '#lib/figures/speciesNames.ts';
import { histogram } from '#lib/statistics/histogram.ts';
import type { Findings } from './findingsView.ts';

type Trees = NonNullable<Findings['trees']>;
type Spread = Trees['slopes'];

/** Bins of the small figure: few, for there are a few hundred trees. */
const BINS = 24;

/** Slopes of the lines that are kept, evenly thinned from all. */
export function treeSlopes({ lines }: Trees) {
	return histogram(
		Float64Array.from(lines, ({ slope }) => slope),
		Math.min(BINS, Math.max(1, lines.length))
	);
}

/** One row for each number that varies over the trees. */
export function spreadRows({ slopes, intercepts, r, rootAge }: Trees, unit: Findings['compared']['ageUnit']) {
	const { per, date } = unitWords(unit);
	const decimals = (places: number) => (value: number) => formatFixed(value, places);
	return [
		spreadRow(`Slope, ${per}`, slopes, formatSlope),
		spreadRow('Intercept', intercepts, decimals(3)),
		spreadRow('r', r, decimals(3)),
		spreadRow(`Age of the root, ${date}`, rootAge, decimals(2))
	];
}

function spreadRow(name: string, { quantiles, highestDensity }: Spread, write: (value: number) => string) {
	const at = (probability: number) => write(quantiles.find(([p]) => p === probability)?.[1] ?? Number.NaN);
	const [from, to] = highestDensity;
	return {
		name,
		median: at(0.5),
		half: `${at(0.25)} to ${at(0.75)}`,
		middle: `${at(0.025)} to ${at(0.975)}`,
		shortest: `${write(from)} to ${write(to)}`
	};
}

/** Every clade of the drawn tree: its age there, and in the trees that hold it. */
export function cladeRows(findings: Findings) {
	const ofNode = new Map((findings.trees?.nodes ?? []).map((row) => [row.node, row]));
	const model = plateModel(findings);
	return model.nodes.map(({ node, age, from, to }) => {
		const held = ofNode.get(node);
		return {
			name: spanName(model.species, from, to - 1),
			species: to - from,
			age,
			share: held?.share ?? null,
			youngest: held?.age?.[0] ?? null,
			oldest: held?.age?.[1] ?? null
		};
	});
}

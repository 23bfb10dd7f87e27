import { scaleLinear, scaleSymlog } from 'd3-scale';
import { median, quantile } from './quantile.ts';

export type AgeSpacing = { readonly kind: 'linear' } | { readonly kind: 'log'; readonly constant: number };

/** The slice of a d3 scale that the figures use. */
export type AgeScale = {
	(age: number): number;
	invert(place: number): number;
	copy(): AgeScale;
	domain(): number[];
	range(): number[];
};

const CROWDED_SHARE = 0.35;

/**
 * Linear, unless the middle 80 % of the nodes fill less than 35 % of the axis; then log(1 + age / a), a = median node age.
 * Never broken: a break would hide how old the old nodes are.
 */
export function ageSpacing(nodeAges: readonly number[], rootAge: number): AgeSpacing {
	const middle = quantile(nodeAges, 0.9) - quantile(nodeAges, 0.1);
	const constant = median(nodeAges);
	// Two nodes or fewer have no middle to be crowded; a median of 0 leaves nothing to divide by.
	if (nodeAges.length < 5 || rootAge <= 0 || constant <= 0 || middle >= CROWDED_SHARE * rootAge) return { kind: 'linear' };
	return { kind: 'log', constant };
}

/** @param range - places of the present and of the root */
export function ageScale(spacing: AgeSpacing, rootAge: number, range: readonly [number, number]): AgeScale {
	const domain = [0, rootAge > 0 ? rootAge : 1];
	// d3's symlog is sign(x) log(1 + |x| / c): for ages exactly the rule above.
	if (spacing.kind === 'log') return scaleSymlog(domain, [...range]).constant(spacing.constant);
	return scaleLinear(domain, [...range]);
}

/** Round ages along the axis, at least `gap` apart; 0 is always one of them. */
export function ageTicks(scale: AgeScale, spacing: AgeSpacing, gap: number): number[] {
	const [, oldest = 1] = scale.domain();
	const [from = 0, to = 1] = scale.range();
	if (spacing.kind === 'linear') return evenTicks(oldest, Math.floor(Math.abs(to - from) / gap));
	const taken = [0];
	for (const age of roundAges(oldest, spacing.constant)) {
		if (taken.every((other) => Math.abs(scale(age) - scale(other)) >= gap)) taken.push(age);
	}
	return taken.sort((a, b) => a - b);
}

/** Round steps from 0; a request for so many ticks may be answered with more, so ask for fewer until none is too close. */
function evenTicks(oldest: number, most: number): number[] {
	const scale = scaleLinear([0, oldest], [0, 1]);
	for (let asked = Math.max(1, Math.min(8, most)); asked > 1; asked--) {
		const ticks = scale.ticks(asked);
		if (((ticks[1] ?? oldest) / oldest) * most >= 1) return ticks;
	}
	return scale.ticks(1);
}

/** 1, 5 and 2 times the powers of ten up to `oldest`, the roundest and oldest first. */
function roundAges(oldest: number, youngest: number): number[] {
	const top = Math.floor(Math.log10(oldest));
	const last = Math.floor(Math.log10(youngest)) - 2;
	return [1, 5, 2].flatMap((lead) => {
		const ages: number[] = [];
		for (let power = top; power >= last; power--) {
			// 3 × 10⁻¹ is not 0.3 in floating point; dividing by a whole power is.
			const age = power < 0 ? lead / 10 ** -power : lead * 10 ** power;
			if (age <= oldest) ages.push(age);
		}
		return ages;
	});
}

/** The ages as written on the axis, without the noise of floating point. */
export function tickTexts(ticks: readonly number[]): string[] {
	return ticks.map((tick) => String(Number(tick.toPrecision(6))));
}

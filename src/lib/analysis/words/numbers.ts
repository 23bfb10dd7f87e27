const MINUS = '−';

function withTrueMinus(text: string): string {
	return text.startsWith('-') ? MINUS + text.slice(1) : text;
}

/** Three significant digits with a true minus; small values stay in plain decimals down to 0.0001, then ×10ⁿ. */
export function formatSlope(value: number, digits = 3): string {
	if (value === 0) return '0';
	const exponent = Math.floor(Math.log10(Math.abs(value)));
	if (exponent >= -4 && exponent < 6)
		return withTrueMinus(Number(value.toPrecision(digits)).toFixed(Math.max(0, digits - 1 - exponent)));
	const [mantissa = '0', power = '0'] = value.toExponential(digits - 1).split('e');
	return `${withTrueMinus(mantissa)} × 10${superscript(Number(power))}`;
}

function superscript(power: number): string {
	const glyphs = '⁰¹²³⁴⁵⁶⁷⁸⁹';
	const digits = [...String(Math.abs(power))].map((digit) => glyphs[Number(digit)] ?? '').join('');
	return power < 0 ? `⁻${digits}` : digits;
}

/** Fixed decimals with a true minus. */
export function formatFixed(value: number, decimals: number): string {
	return withTrueMinus(value.toFixed(decimals));
}

/** 99999 → 99,999 */
export function formatCount(value: number): string {
	return String(Math.round(value)).replace(/\B(?=(\d{3})+(?!\d))/g, ',');
}

/**
 * A permutation p with its sign: “= 0.0016”, “≤ 0.00001” at the floor of a Monte Carlo test. Two significant digits.
 * @param floor - the smallest value the test can give; null for an exact test, which has no floor to hide behind
 */
export function formatP(p: number, floor: number | null): string {
	if (floor !== null && p <= floor * (1 + 1e-9)) return `≤ ${trimmed(floor).replace(/0+$/, '')}`;
	return `= ${trimmed(p)}`;
}

function trimmed(p: number): string {
	if (p >= 0.995) return p === 1 ? '1' : p.toFixed(3);
	const decimals = Math.min(9, Math.max(2, 1 - Math.floor(Math.log10(p))));
	return p.toFixed(decimals);
}

/** Percent without decimals from 10 up, one decimal below. */
export function formatShare(share: number): string {
	const percent = share * 100;
	return `${percent >= 10 || percent === 0 ? percent.toFixed(0) : percent.toFixed(1)} %`;
}

/** An age with its unit as people say it: one decimal, two if the root is younger than 10. */
export function formatAge(age: number, rootAge: number): string {
	return formatFixed(age, rootAge < 10 ? 2 : 1);
}

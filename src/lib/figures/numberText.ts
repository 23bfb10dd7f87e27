/** A number with a true minus sign. */
export function signed(value: number, digits: number): string {
	const text = Math.abs(value).toFixed(digits);
	return value < 0 && Number(text) !== 0 ? `−${text}` : text;
}

/** A number at so many significant digits, never in exponent form for the sizes a figure shows. */
export function significant(value: number, digits: number): string {
	if (value === 0) return '0';
	const places = Math.max(0, Math.min(12, digits - 1 - Math.floor(Math.log10(Math.abs(value)))));
	return signed(value, places);
}

/** 40320 becomes 40,320. */
export function grouped(count: number): string {
	return String(Math.round(count)).replace(/\B(?=(\d{3})+$)/g, ',');
}

/** Ages: one decimal, two where the root is younger than 10 (unit of the tree). */
export function ageText(age: number, rootAge: number): string {
	return age.toFixed(rootAge < 10 ? 2 : 1);
}

/** An overlap to two decimals, three when two would hide a value that is neither 0 nor 1. */
export function overlapText(value: number): string {
	const two = signed(value, 2);
	return (two === '0.00' && value !== 0) || (two === '1.00' && value !== 1) ? signed(value, 3) : two;
}

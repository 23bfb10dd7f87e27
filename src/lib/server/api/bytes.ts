export const MIB = 1024 * 1024;

/** Limits count the text, not the JSON around it. */
export const TREE_TEXT_LIMIT_BYTES = 64 * MIB;
/** 2,000 species at full precision make a square of about 73 MiB: the limit that people meet is the number of species. */
export const MATRIX_TEXT_LIMIT_BYTES = 96 * MIB;
/** A text of 64 MiB is about 73 MiB of JSON; more room for texts full of line breaks and quotes. */
export const LARGE_BODY_LIMIT_BYTES = 192 * MIB;
/** Plans, names and reports: 10,000 decisions with their reasons fit. */
export const BODY_LIMIT_BYTES = 16 * MIB;

/** `67108864` → "64 MiB (67,108,864 bytes)" */
export function inWords(bytes: number): string {
	const mib = new Intl.NumberFormat('en', { maximumFractionDigits: 1 }).format(bytes / MIB);
	return `${mib} MiB (${new Intl.NumberFormat('en').format(bytes)} bytes)`;
}

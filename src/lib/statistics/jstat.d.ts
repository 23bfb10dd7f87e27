/** The part of jstat that is used; the package ships no types. */
declare module 'jstat' {
	const jstat: {
		readonly beta: {
			/** value below which the share `p` of a beta(alpha, beta) distribution lies */
			inv(p: number, alpha: number, beta: number): number;
		};
	};
	export default jstat;
}

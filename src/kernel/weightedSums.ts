/** What `weightedSums` reads. Fields stand in memory in this order, four bytes each; the caller writes them so. */
@unmanaged
export class WeightedSumsTask {
	/** shape (count, slots) of f64 */
	sums: usize;
	count: i32;
	slots: i32;
	/** shape (forms, slots) of f64 */
	weights: usize;
	forms: i32;
	/** out: shape (count, forms) of f64 */
	values: usize;
}

/** Sums over slots of weight times sum, first slot first, as `weightedSum` adds them. */
export function weightedSums(task: WeightedSumsTask): void {
	const slotBytes = (<usize>task.slots) << 3;
	let value = task.values;
	for (let k: usize = 0; k < <usize>task.count; k++) {
		const sums = task.sums + k * slotBytes;
		for (let form: usize = 0; form < <usize>task.forms; form++, value += 8) {
			const weights = task.weights + form * slotBytes;
			let sum: f64 = 0;
			for (let at: usize = 0; at < slotBytes; at += 8) sum += load<f64>(weights + at) * load<f64>(sums + at);
			store<f64>(value, sum);
		}
	}
}

export type Clock = { readonly now: Date; /** IANA name; the reader’s own when absent */ readonly timeZone?: string };

/** A moment as people say it: “today 14:02”, “yesterday 09:30”, “28 Nov 14:02”, “28 Nov 2025”. */
export function whenText(iso: string, { now, timeZone }: Clock): string {
	const at = new Date(iso);
	const zone = timeZone === undefined ? {} : { timeZone };
	const day = (moment: Date) => moment.toLocaleDateString('en-CA', zone);
	const time = at.toLocaleTimeString('en-GB', { ...zone, hour: '2-digit', minute: '2-digit' });
	if (day(at) === day(now)) return `today ${time}`;
	if (day(at) === day(new Date(now.getTime() - 86_400_000))) return `yesterday ${time}`;
	const date = at.toLocaleDateString('en-GB', { ...zone, day: 'numeric', month: 'short' });
	const year = at.toLocaleDateString('en-GB', { ...zone, year: 'numeric' });
	return year === now.toLocaleDateString('en-GB', { ...zone, year: 'numeric' }) ? `${date} ${time}` : `${date} ${year}`;
}

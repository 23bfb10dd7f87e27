import { SIGNAL_CAUTION, signalSentence } from '#lib/analysis/words/signalSentence.ts';
import type { Findings } from './findingsView.ts';

export const SIGNAL = {
	id: 'signal',
	title: 'Signal in niche position',
	sentence: ({ signal, compared }: Findings) => (signal === undefined ? null : signalSentence(signal, compared.alpha)),
	caution: () => SIGNAL_CAUTION,
	load: () => import('./sections/Signal.svelte')
};

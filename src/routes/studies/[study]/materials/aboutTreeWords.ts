import type { TreeAbout } from '#lib/contracts/treeAbout.ts';
import { counted } from './materialWords.ts';

/** What is known of a tree beyond its text, in one line; or that it is still to be said. */
export function aboutTreeWords({ speciesInClade, placement, placedTips, calibration, source }: TreeAbout): string {
	const known = [
		speciesInClade === null ? '' : `${counted(speciesInClade, 'living species', 'living species')} in the clade`,
		placement === 'sequences' ? 'all tips by sequences' : '',
		placement === 'some-placed' ? `${counted(placedTips.length, 'tip', 'tips')} placed by taxonomy` : '',
		calibration === '' ? '' : `ages from ${calibration}`,
		source
	].filter((words) => words !== '');
	return known.length === 0
		? 'Say what only its author knows: species in the clade, placed tips, calibration, source'
		: known.join(' · ');
}

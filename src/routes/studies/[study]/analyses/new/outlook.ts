import type { PageData } from './$types';

type Planned = NonNullable<PageData['plan']>;

/** What the plan could say, or why it cannot be run. */
export type Outlook = Planned['outlook'];
/** The fields as they are typed. */
export type Typed = Planned['values'];

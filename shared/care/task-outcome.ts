/** How a person closes a task: done, looked at and found not needed, or tried and could not. */
export const personOutcomes = ['done', 'notNeeded', 'couldNot'] as const;
/** One of {@link personOutcomes}. */
export type PersonOutcome = (typeof personOutcomes)[number];

/** What can become of a task. One is `missed` when a later task of its routine was done while it was still open. */
export const taskOutcomes = [...personOutcomes, 'missed'] as const;
/** One of {@link taskOutcomes}. */
export type TaskOutcome = (typeof taskOutcomes)[number];

/**
 * Whom a `routine` falls to, as SQL: where people have left, one of a pair alone does what one person does, and where
 * nobody is left it is whoever is on duty. Also for a `task` without a routine.
 */
export const routineWho = `
  CASE (SELECT count(*) FROM routine_person WHERE routine_person.routine_id = routine.id)
    WHEN 0 THEN 'onDuty' WHEN 1 THEN 'person' ELSE routine.who END`;

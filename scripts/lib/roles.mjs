/** The superuser of a cluster that the scripts make; it exists on loopback only and never in a department's own database. */
export const superuser = 'wf'

export const roles = {
  /** Owns the schema and migrates it. */
  owner: 'wherefore_owner',
  /** What the server works as: reads and writes rows, owns nothing. */
  app: 'wherefore_app',
  /** Runs the job queue and owns its schema. */
  worker: 'wherefore_worker',
}

/** Makes the three roles where they are missing. Roles belong to the cluster, not to one database. */
export const rolesSql = `
do $$
declare wanted text;
begin
  foreach wanted in array array['${Object.values(roles).join("', '")}'] loop
    if not exists (select from pg_roles where rolname = wanted) then
      execute format('create role %I login nosuperuser nocreatedb nocreaterole', wanted);
    end if;
  end loop;
end $$`

/**
 * What a database grants as a whole: nobody but the three roles gets in, and the worker may make the queue's schema. A database
 * made from a template does not inherit this, so it is said for each.
 *
 * @param {string} database a plain lower-case name
 */
export const databaseGrantsSql = (database) => `
revoke all on database ${plainName(database)} from public;
grant connect on database ${database} to ${roles.owner}, ${roles.app}, ${roles.worker};
grant create on database ${database} to ${roles.worker};`

/** Returns the name when it needs no quoting in SQL, throws otherwise. */
export function plainName(name) {
  if (!/^[a-z][a-z0-9_]{0,62}$/.test(name)) throw new Error(`Not a plain database name: ${name}`)
  return name
}

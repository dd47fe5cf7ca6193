/**
 * Sessions end with what they were begun on: whoever is suspended, or given other roles or another password, signs in anew. In the database,
 * so that it holds whichever way the account is changed.
 */
import type { Knex } from 'knex'

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    CREATE FUNCTION end_sessions() RETURNS trigger LANGUAGE plpgsql AS $$
    BEGIN
      DELETE FROM sessions WHERE sess #>> '{passport,user}' = NEW.id::text;
      RETURN NULL;
    END $$;
    CREATE TRIGGER users_end_sessions AFTER UPDATE OF state, roles, password_hash ON users FOR EACH ROW
      WHEN ((OLD.state, OLD.roles, OLD.password_hash) IS DISTINCT FROM (NEW.state, NEW.roles, NEW.password_hash))
      EXECUTE FUNCTION end_sessions();
  `)
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('DROP TRIGGER users_end_sessions ON users; DROP FUNCTION end_sessions();')
}

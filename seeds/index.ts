/** Fills an empty database: with the invented demonstration, with the published sample, or with the scale alone. */
import type { Knex } from 'knex'
import type { Config } from '../server/config.ts'
import { addAccounts } from './accounts.ts'
import { fillWithDemonstration } from './demonstration/fill.ts'
import { layTheScale } from './genesis.ts'
import { personCalled, servicesWithin } from './people.ts'
import { fillWithPublishedSample } from './published/fill.ts'

export interface SeedOptions {
  knex: Knex
  config: Config
  log: { info: (sentence: string) => void }
}

/** Stands in where nobody chose a password; `npm start` generates one. */
const PASSWORD_OF_TESTS = 'demonstration-only'

/** Seeds a database in which nobody and nothing is yet; any other is left alone. */
export async function seedWhenEmpty({ knex, config, log }: SeedOptions): Promise<{ seeded: boolean }> {
  const seeded = await knex.transaction(async (trx) => {
    // Two starts at once: the second waits, and then finds the database filled.
    await trx.raw("select pg_advisory_xact_lock(hashtext('vicinage seed'))")
    if (await holdsAnything(trx)) return false
    const people = await addAccounts(trx, config.demoPassword ?? PASSWORD_OF_TESTS)
    const services = servicesWithin(trx, config)
    await layTheScale(trx, people.get('steward@demo.vicinage.test') ?? null, new Date('2026-01-12T09:00:00Z'))
    await trx('catalogueKind').update({ kind: config.catalogue })
    if (config.catalogue === 'demonstration') {
      log.info('Inventing a neighbourhood for the demonstration.')
      await fillWithDemonstration(trx, people, services)
    } else if (config.catalogue === 'published') {
      log.info('Filling the catalogue with the published sample.')
      await fillWithPublishedSample(services, { curator: personCalled(people, 'curator'), approver: personCalled(people, 'approver'), steward: personCalled(people, 'steward') })
    }
    return true
  })
  return { seeded }
}

async function holdsAnything(trx: Knex): Promise<boolean> {
  const { rows } = (await trx.raw('select exists (select from users) or exists (select from revisions) as held')) as { rows: { held: boolean }[] }
  return rows[0]?.held ?? false
}

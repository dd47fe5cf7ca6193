import type { HostOutlook, MeasurementCheck } from './check.ts'

const MOST_NAMED = 5

/** With this value somebody would belong to another host: the reviewer should know before anything else. */
export const hostChange: MeasurementCheck = (_proposed, { galaxy, outlook }) => {
  if (outlook === null) return null
  if (outlook === 'many') return { check: 'host-change', level: 'ok', sentence: 'Among so many changes hosts are not looked into one by one: the effect tells who changes host.' }
  const { own, satellites } = outlook
  const words = [
    ...(own.before !== own.after ? [`${galaxy} would ${becoming(own)}`] : []),
    ...(satellites.length > 0 ? [others(satellites)] : []),
  ]
  if (words.length === 0) return { check: 'host-change', level: 'ok', sentence: 'Nobody changes host.' }
  return { check: 'host-change', level: 'warn', sentence: `${words.join('; ')}.` }
}

function becoming({ before, after }: HostOutlook['own']): string {
  if (after === null) return `leave ${before ?? 'its host'} and stand in the field`
  return before === null ? `become a satellite of ${after}` : `pass from ${before} to ${after}`
}

function others(satellites: HostOutlook['satellites']): string {
  const named = satellites.slice(0, MOST_NAMED).map((s) => s.name).join(', ')
  const more = satellites.length - MOST_NAMED
  return `${satellites.length === 1 ? 'another galaxy changes host with it' : `${satellites.length} other galaxies change host with it`}: ${named}${more > 0 ? ` and ${more} more` : ''}`
}

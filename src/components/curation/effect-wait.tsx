import type { EffectProgress } from '../../api/effect.ts'
import { formatPercent } from '../../lib/format.ts'
import { Progress } from '../meter.tsx'

/** While the effect is computed: what is being done, and how far it is. */
export function EffectWait({ progress }: { progress: EffectProgress | null }) {
  return <Progress label={progress?.step ?? 'Computing the effect'} value={progress === null ? undefined : progress.progress * 100} text={progress === null ? '' : formatPercent(progress.progress)} />
}

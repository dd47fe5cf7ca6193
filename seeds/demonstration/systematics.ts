/**
 * What no paper of the invented literature knows: how far off its methods and anchors are. Drawn as the policy says that they are uncertain, so that
 * adopted distances scatter about the truth as their errors say.
 *
 * An anchor is wrong by one number for all galaxies. A method is wrong by another number in every galaxy (its stars differ in age and metals, its
 * fields in crowding): that is what a systematic error means that several values of one galaxy by one method share.
 */
import type { Anchor } from '../../core/catalogue/types.ts'
import type { MethodKey } from '../../core/methods.ts'
import type { Random } from '../../core/random.ts'
import type { Policy } from '../../core/scale/policy.ts'

export interface Systematics {
  /** What is added to every modulus by a method that hangs on an anchor, mag, by the anchor's key. */
  ofAnchors: ReadonlyMap<string, number>
  /** Draws what is added to all moduli of one galaxy by each method, mag. */
  ofGalaxy: () => (method: MethodKey) => number
  /** By how much values of a method that do not say on which anchor value they hang are off, standard deviation, mag. */
  unscaled: (method: MethodKey) => number
}

export function drawSystematics(draw: Random, policy: Pick<Policy, 'methods'>, anchors: readonly Anchor[]): Systematics {
  const ofAnchors = new Map(anchors.map((a) => [a.key, a.err * draw.normal()]))
  return {
    ofAnchors,
    unscaled: (method) => policy.methods.find((rule) => rule.method === method)?.unscaled ?? 0,
    ofGalaxy: () => {
      const drawn = new Map(policy.methods.map((rule) => [rule.method, rule.systematic * draw.normal()]))
      return (method) => drawn.get(method) ?? 0
    },
  }
}

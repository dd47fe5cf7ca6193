/** Invented names: of hosts, of field galaxies, of people. None is a real galaxy, person or institution that we know of. */

export const HOST_NAMES = [
  'Ostrel', 'Mirrow', 'Vesk', 'Tamsin', 'Quarrow', 'Hollin', 'Ansel', 'Corvane', 'Eldermere', 'Brightwater', 'Pallas Reach', 'Sennet',
] as const

/** What the invented observers call the galaxy that they live in. */
export const OWN_NAME = 'Hearth'

export const FIELD_NAMES = [
  'Ambry', 'Bellwether', 'Carrick Wisp', 'Dunmore', 'Ember Lantern', 'Fallow', 'Gannet', 'Harrowgate', 'Islay Mote', 'Jessamy', 'Kestrel Light',
  'Larkspur', 'Marrable', 'Nettlebed', 'Orrery', 'Pell', 'Quillon', 'Rushlight', 'Saltmarsh', 'Thistledown', 'Umberleigh', 'Vellum', 'Wether',
  'Yarrow', 'Zennor', 'Ashlar', 'Birling', 'Cobnut', 'Dimity', 'Eyebright', 'Feverfew', 'Gorse', 'Hob', 'Inkle', 'Juniper', 'Kelp', 'Lanyard',
  'Madder', 'Nib', 'Osier', 'Paling', 'Quoin', 'Rill', 'Spindrift', 'Tansy', 'Ullage', 'Vetch', 'Withy', 'Yaffle', 'Zephyr Mote',
] as const

export const AUTHORS = [
  'Harrow, I.', 'Lindqvist, M.', 'Okoro, A.', 'Marsh, T.', 'Brandt, E.', 'Farrow, I.', 'Abara, L.', 'Wren, S.', 'Castellan, R.', 'Dunmore, P.',
  'Eskola, V.', 'Fairweather, J.', 'Galbraith, N.', 'Hinterland, O.', 'Ibarrola, C.', 'Jessop, K.', 'Kowalczyn, D.', 'Larkin, B.', 'Moreau-Pell, H.', 'Nakagiri, Y.',
] as const

/** @param n - 1 to 3999 */
export function roman(n: number): string {
  const parts: readonly (readonly [number, string])[] = [
    [1000, 'M'], [900, 'CM'], [500, 'D'], [400, 'CD'], [100, 'C'], [90, 'XC'], [50, 'L'], [40, 'XL'], [10, 'X'], [9, 'IX'], [5, 'V'], [4, 'IV'], [1, 'I'],
  ]
  let left = n
  let text = ''
  for (const [size, letters] of parts) {
    while (left >= size) {
      text += letters
      left -= size
    }
  }
  return text
}

/** Colour as the tests judge it, by published formulas. Colours are `#rrggbb`. */
export type Triple = [number, number, number]
type Matrix3 = [Triple, Triple, Triple]

const times = (m: Matrix3, [a, b, c]: Triple): Triple => [m[0][0] * a + m[0][1] * b + m[0][2] * c, m[1][0] * a + m[1][1] * b + m[1][2] * c, m[2][0] * a + m[2][1] * b + m[2][2] * c]

/** sRGB to linear light (IEC 61966-2-1). */
export function linear(colour: string): Triple {
  const channel = (from: number): number => {
    const c = Number.parseInt(colour.slice(from, from + 2), 16) / 255
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4
  }
  return [channel(1), channel(3), channel(5)]
}

/** Contrast ratio of WCAG 2.2, 1 to 21. */
export function contrast(a: string, b: string): number {
  const luminance = (colour: string): number => {
    const [r, g, blue] = linear(colour)
    return 0.2126 * r + 0.7152 * g + 0.0722 * blue
  }
  const [one, other] = [luminance(a), luminance(b)]
  return (Math.max(one, other) + 0.05) / (Math.min(one, other) + 0.05)
}

/** Machado, Oliveira & Fernandes 2009, IEEE TVCG 15, 1291, severity 1.0, on linear RGB. */
export const DEFICIENCIES: Readonly<Record<string, Matrix3>> = {
  protanopia: [[0.152286, 1.052583, -0.204868], [0.114503, 0.786281, 0.099216], [-0.003882, -0.048116, 1.051998]],
  deuteranopia: [[0.367322, 0.860646, -0.227968], [0.280085, 0.672501, 0.047413], [-0.01182, 0.04294, 0.968881]],
  tritanopia: [[1.255528, -0.076749, -0.178779], [-0.078411, 0.930809, 0.147602], [0.004733, 0.691367, 0.3039]],
}

export function seenWith(rgb: Triple, matrix: Matrix3): Triple {
  const clip = (value: number): number => Math.min(1, Math.max(0, value))
  const [r, g, b] = times(matrix, rgb)
  return [clip(r), clip(g), clip(b)]
}

const TO_XYZ: Matrix3 = [[0.4124564, 0.3575761, 0.1804375], [0.2126729, 0.7151522, 0.072175], [0.0193339, 0.119192, 0.9503041]]
const WHITE: Triple = [0.95047, 1, 1.08883]

/** CIE 1976 L*a*b* under D65, of linear sRGB. */
export function lab(rgb: Triple): Triple {
  const xyz = times(TO_XYZ, rgb)
  const root = (value: number, white: number): number => {
    const t = value / white
    return t > 216 / 24389 ? Math.cbrt(t) : ((24389 / 27) * t + 16) / 116
  }
  const [x, y, z] = [root(xyz[0], WHITE[0]), root(xyz[1], WHITE[1]), root(xyz[2], WHITE[2])]
  return [116 * y - 16, 500 * (x - y), 200 * (y - z)]
}

const RAD = Math.PI / 180

/** CIEDE2000 (Sharma, Wu & Dalal 2005, Color Research & Application 30, 21), all weights 1. */
export function ciede2000([l1, a1, b1]: Triple, [l2, a2, b2]: Triple): number {
  const meanC = (Math.hypot(a1, b1) + Math.hypot(a2, b2)) / 2
  const g = 0.5 * (1 - Math.sqrt(meanC ** 7 / (meanC ** 7 + 25 ** 7)))
  const [p1, p2] = [a1 * (1 + g), a2 * (1 + g)]
  const [c1, c2] = [Math.hypot(p1, b1), Math.hypot(p2, b2)]
  const hue = (a: number, b: number): number => (a === 0 && b === 0 ? 0 : (Math.atan2(b, a) / RAD + 360) % 360)
  const [h1, h2] = [hue(p1, b1), hue(p2, b2)]
  const grey = c1 * c2 === 0
  const turn = grey ? 0 : h2 - h1 > 180 ? h2 - h1 - 360 : h2 - h1 < -180 ? h2 - h1 + 360 : h2 - h1
  const dL = l2 - l1
  const dC = c2 - c1
  const dH = 2 * Math.sqrt(c1 * c2) * Math.sin((turn / 2) * RAD)
  const meanL = (l1 + l2) / 2
  const meanChroma = (c1 + c2) / 2
  const meanH = grey ? h1 + h2 : Math.abs(h1 - h2) <= 180 ? (h1 + h2) / 2 : h1 + h2 < 360 ? (h1 + h2 + 360) / 2 : (h1 + h2 - 360) / 2
  const t = 1 - 0.17 * Math.cos((meanH - 30) * RAD) + 0.24 * Math.cos(2 * meanH * RAD) + 0.32 * Math.cos((3 * meanH + 6) * RAD) - 0.2 * Math.cos((4 * meanH - 63) * RAD)
  const sL = 1 + (0.015 * (meanL - 50) ** 2) / Math.sqrt(20 + (meanL - 50) ** 2)
  const sC = 1 + 0.045 * meanChroma
  const sH = 1 + 0.015 * meanChroma * t
  const rT = -Math.sin(60 * Math.exp(-(((meanH - 275) / 25) ** 2)) * RAD) * 2 * Math.sqrt(meanChroma ** 7 / (meanChroma ** 7 + 25 ** 7))
  return Math.sqrt((dL / sL) ** 2 + (dC / sC) ** 2 + (dH / sH) ** 2 + rT * (dC / sC) * (dH / sH))
}

/**
 * Colours of figures. Paper and Night are the interface's own tokens (a test compares them); Print is Paper's inks on white.
 */
import type { FigureTheme } from './recipe.ts'

/** Classes share six hues; shape tells apart those that share one. */
export const CLASS_HUES = ['spiral', 'early', 'spheroidal', 'irregular', 'compact', 'unknown'] as const
export type ClassHue = (typeof CLASS_HUES)[number]

export interface FigureColours {
  /** Behind everything. */
  paper: string
  /** Inside the map. */
  sheet: string
  ink: string
  muted: string
  line: string
  accent: string
  zone: string
  classes: Readonly<Record<ClassHue, string>>
}

const PAPER: FigureColours = {
  paper: '#f6f2e9',
  sheet: '#fcfaf4',
  ink: '#1d2733',
  muted: '#56616d',
  line: '#d8cfbd',
  accent: '#a8321f',
  zone: '#e6dbc6',
  classes: { spiral: '#1a92bf', early: '#511932', spheroidal: '#a8801a', irregular: '#0d5f1c', compact: '#37286e', unknown: '#7d7c7b' },
}

const NIGHT: FigureColours = {
  paper: '#0e1420',
  sheet: '#151d2b',
  ink: '#e6e1d6',
  muted: '#98a3b3',
  line: '#2b374a',
  accent: '#e4785f',
  zone: '#1d2737',
  classes: { spiral: '#72f4fe', early: '#a94f9a', spheroidal: '#e7b44f', irregular: '#bef7b2', compact: '#4586f0', unknown: '#a39d93' },
}

const PRINT: FigureColours = { ...PAPER, paper: '#ffffff', sheet: '#ffffff', line: '#c9c9c9', zone: '#ececec', muted: '#4d5660' }

export const FIGURE_COLOURS: Readonly<Record<FigureTheme, FigureColours>> = { paper: PAPER, night: NIGHT, print: PRINT }

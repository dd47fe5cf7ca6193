/** Answers that come line by line (NDJSON): how far a long computation is, then what came of it, or what went wrong. */
import type { Response } from 'express'
import { asAnswer, problemOf } from './problem.ts'

/** Told no more often than anybody could read it. */
const EVERY_MS = 100

/**
 * @param work - is handed a way to tell a line; lines that follow one another too soon are left out. What it returns is the last line
 */
export async function answerInLines(response: Response, work: (tell: (line: object) => void) => Promise<object>): Promise<void> {
  response.status(200).setHeader('content-type', 'application/x-ndjson; charset=utf-8')
  // A proxy that gathers the answer would make it useless.
  response.setHeader('x-accel-buffering', 'no')
  let told = 0
  const write = (line: object): void => {
    response.write(`${JSON.stringify(line)}\n`)
    // What compression holds back.
    ;(response as Response & { flush?: () => void }).flush?.()
  }
  try {
    write(await work((line) => {
      const now = Date.now()
      if (now - told < EVERY_MS || response.destroyed) return
      told = now
      write(line)
    }))
  } catch (error) {
    // The answer has begun as a success: a fault of ours must still reach the log.
    write({ problem: problemOf(error) })
    if (!asAnswer(error)) throw error
  } finally {
    response.end()
  }
}

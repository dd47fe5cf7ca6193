import { execFileSync } from 'node:child_process'

/** Runs a few lines of the machine's own Python with numpy (np): they read `given` and set `answer`, both plain JSON. */
export function numpy<Answer>(lines: string, given: unknown): Answer {
  const script = `import json, sys\nimport numpy as np\ngiven = json.load(sys.stdin)\n${lines}\njson.dump(answer, sys.stdout)`
  return JSON.parse(execFileSync('/usr/bin/python3', ['-c', script], { input: JSON.stringify(given), encoding: 'utf8', maxBuffer: 2 ** 26 })) as Answer
}

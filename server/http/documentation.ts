/** The interface as a page: no script, nothing from outside. */
import { COLUMNS } from '../../core/columns.ts'
import { PERMISSIONS } from '../../core/permissions.ts'
import type { Route } from './route.ts'

const escape = (text: string): string => text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;')

const STYLE = `body{font:17px/1.5 'Source Sans 3 Variable',system-ui,sans-serif;margin:2rem auto;max-width:64rem;padding:0 1rem;color:#1d2733;background:#f6f2e9}
h1,h2{font-family:Georgia,serif}table{border-collapse:collapse;width:100%;background:#fcfaf4}td,th{border:1px solid #d8cfbd;padding:.35rem .6rem;text-align:left;vertical-align:top}
code{font-family:ui-monospace,monospace;font-size:.9em}.scroll{overflow-x:auto}
@media(prefers-color-scheme:dark){body{color:#e6e1d6;background:#0e1420}table{background:#151d2b}td,th{border-color:#2b374a}a{color:#e4785f}}`

export function documentationPage(routes: readonly Route[]): string {
  const rows = routes.map((r) => `<tr><td><code>${r.method.toUpperCase()} ${escape(r.path)}</code></td><td>${escape(r.summary)}</td><td>${escape(PERMISSIONS[r.permission].join(', '))}</td></tr>`)
  const columns = COLUMNS.map((c) => `<tr><td><code>${c.key}</code></td><td>${escape(c.description)}</td><td>${escape(c.unit)}</td><td><code>${escape(c.ucd)}</code></td></tr>`)
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>Interface · Vicinage</title><style>${STYLE}</style></head><body><main>
<h1>The interface of Vicinage</h1>
<p>JSON over HTTP, described in full by <a href="/api/openapi.json">OpenAPI 3.1</a>. Without signing in, reads answer from the newest release; <code>at=</code> chooses another release (or, signed in, a revision).
Every answer of the catalogue says which revision it was read at (<code>X-Catalogue-Revision</code>). What went wrong is said as problem details (RFC 9457) that name the field and the reason.</p>
<h2>Addresses</h2><div class="scroll"><table><thead><tr><th>address</th><th>what it does</th><th>who may</th></tr></thead><tbody>${rows.join('')}</tbody></table></div>
<h2>Filters</h2>
<p>One query parameter a column: <code>host=ostrel&amp;class=dwarf-spheroidal,dwarf-irregular&amp;distance=2..5&amp;abs_v=..-10&amp;has=v_hel</code>. Ranges are <code>lo..hi</code> with either end open; lists are commas, any of; <code>!</code> before a list excludes;
<code>has=</code> and <code>lacks=</code> ask for a value; <code>q=</code> searches names, <code>cone=ra,dec,radius</code> the sky (degrees), <code>within=host,kpc</code> space.</p>
<h2>Columns</h2><div class="scroll"><table><thead><tr><th>key</th><th>what it is</th><th>unit</th><th>UCD</th></tr></thead><tbody>${columns.join('')}</tbody></table></div>
<h2>From Python</h2><pre><code>from astropy.table import Table
t = Table.read("https://your.server/api/export.vot?host=ostrel", format="votable")</code></pre>
</main></body></html>`
}

/** The interface as a page: no script, nothing from outside. */
import { COLUMNS } from '../../core/columns.ts'
import { PERMISSIONS } from '../../core/permissions.ts'
import { jsonSchemaOf } from './json-schema.ts'
import { tagOf, type AnyRoute } from './openapi.ts'
import type { Route } from './route.ts'

const escape = (text: string): string => text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;')

const STYLE = `body{font:17px/1.5 'Source Sans 3 Variable',system-ui,sans-serif;margin:2rem auto;max-width:64rem;padding:0 1rem;color:#1d2733;background:#f6f2e9}
h1,h2,h3{font-family:'Source Serif 4 Variable',Georgia,serif;line-height:1.2}h2{margin-top:2.5rem}a{color:#8a3b22}
table{border-collapse:collapse;width:100%;background:#fcfaf4}td,th{border:1px solid #d8cfbd;padding:.35rem .6rem;text-align:left;vertical-align:top}
code,pre{font-family:ui-monospace,monospace;font-size:.88em}p code,td code{overflow-wrap:anywhere}pre{overflow-x:auto;background:#fcfaf4;border:1px solid #d8cfbd;padding:.6rem;max-height:28rem}
.scroll{overflow-x:auto}article{border-top:1px solid #d8cfbd;padding:.7rem 0}article p{margin:.2rem 0}article h3{font:600 1rem/1.4 ui-monospace,monospace;margin:0;overflow-wrap:anywhere}
summary{cursor:pointer}nav a{margin-right:.8rem;display:inline-block;padding:.2rem 0}
@media(prefers-color-scheme:dark){body{color:#e6e1d6;background:#0e1420}table,pre{background:#151d2b}td,th,pre,article{border-color:#2b374a}a{color:#e8917a}}`

export function documentationPage(routes: readonly Route[], publicUrl: string): string {
  const byTag = groups(routes)
  const nav = [...byTag.keys()].map((tag) => `<a href="#${tag}">${tag}</a>`).join('')
  const sections = [...byTag].map(([tag, list]) => `<section aria-labelledby="${tag}"><h2 id="${tag}">${tag}</h2>${list.map(article).join('')}</section>`)
  const columns = COLUMNS.map((c) => `<tr><td><code>${c.key}</code></td><td>${escape(c.description)}</td><td>${escape(c.unit)}</td><td><code>${escape(c.ucd)}</code></td></tr>`)
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>Interface · Vicinage</title><link rel="icon" href="/mark.svg"><style>${STYLE}</style></head><body><main>
<h1>The interface of Vicinage</h1>
<p>JSON over HTTP, described in full by <a href="/api/openapi.json">OpenAPI 3.1</a>. Without signing in, reads answer from the newest release; <code>at=</code> chooses another release (or, signed in, a revision).
Every answer of the catalogue says which revision it was read at (<code>X-Catalogue-Revision</code>). What went wrong is said as problem details (RFC 9457) that name the field and the reason.</p>
<h2 id="from-a-program">From a program</h2><pre tabindex="0"><code>${escape(`from astropy.table import Table
members = Table.read("${publicUrl}/api/export.vot?host=ostrel", format="votable")`)}</code></pre>
<p>To write, sign in with <code>POST /api/session</code>, keep the cookie, and send the <code>csrfToken</code> of the answer as <code>X-CSRF-Token</code>.</p>
<h2 id="filters">Filters</h2>
<p>One query parameter a column: <code>host=ostrel&amp;class=dwarf-spheroidal,dwarf-irregular&amp;distance=2..5&amp;abs_v=..-10&amp;has=v_hel</code>. Ranges are <code>lo..hi</code> with either end open; lists are commas, any of; <code>!</code> before a list excludes;
<code>has=</code> and <code>lacks=</code> ask for a value; <code>q=</code> searches names, <code>cone=ra,dec,radius</code> the sky (degrees), <code>within=host,kpc</code> space.</p>
<h2 id="addresses">Addresses</h2><nav aria-label="Addresses">${nav}<a href="#columns">columns</a></nav>
${sections.join('\n')}
<h2 id="columns">Columns</h2><div class="scroll" tabindex="0" role="region" aria-labelledby="columns"><table><thead><tr><th>key</th><th>what it is</th><th>unit</th><th>UCD</th></tr></thead><tbody>${columns.join('')}</tbody></table></div>
</main></body></html>`
}

function groups(routes: readonly Route[]): Map<string, AnyRoute[]> {
  const byTag = new Map<string, AnyRoute[]>()
  for (const r of routes as readonly unknown[] as readonly AnyRoute[]) byTag.set(tagOf(r.path), [...(byTag.get(tagOf(r.path)) ?? []), r])
  return byTag
}

function article(r: AnyRoute): string {
  const parts = [
    r.query && details('Query', jsonSchemaOf(r.query, 'input')),
    r.body && details('Body', jsonSchemaOf(r.body, 'input')),
    r.answer && details('Answer', jsonSchemaOf(r.answer, 'output')),
  ]
  const filtered = r.filtered ? ' Takes <a href="#filters">filters</a>.' : ''
  const file = r.upload ? ` One file, in the field <code>${escape(r.upload.field)}</code>.` : ''
  return `<article><h3>${r.method.toUpperCase()} ${escape(r.path)}</h3><p>${escape(r.summary)}.${filtered}${file}</p><p>For ${escape(PERMISSIONS[r.permission].join(', '))}.</p>${parts.filter((p) => p !== undefined).join('')}</article>`
}

function details(what: string, schema: unknown): string {
  return `<details><summary>${what}</summary><pre tabindex="0"><code>${escape(JSON.stringify(schema, null, 1))}</code></pre></details>`
}

// Runs before everything else, for what cannot wait. Plain script of its own: the security policy forbids inline script.
;(function () {
  // The chosen theme before the first paint. The same key and words as src/lib/theme.ts.
  var choice = null
  try {
    choice = localStorage.getItem('vicinage.theme')
  } catch {
    // Storage may be forbidden: the system's preference it is.
  }
  var night = choice === 'night' || (choice !== 'paper' && matchMedia('(prefers-color-scheme: dark)').matches)
  document.documentElement.dataset.theme = night ? 'night' : 'paper'

  // Zod compiles its readers with `new Function` where it may; the policy forbids that, and even the asking is reported as a
  // violation. Schemas are made while modules load, so it must know before.
  globalThis.__zod_globalConfig = { jitless: true }
})()

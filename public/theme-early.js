// Runs before the first paint. The same key and words as src/lib/theme.ts.
;(function () {
  var choice = null
  try {
    choice = localStorage.getItem('vicinage.theme')
  } catch {
    // Storage may be forbidden: the system's preference it is.
  }
  var night = choice === 'night' || (choice !== 'paper' && matchMedia('(prefers-color-scheme: dark)').matches)
  document.documentElement.dataset.theme = night ? 'night' : 'paper'
})()

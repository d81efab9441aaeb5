/*
 * Runs before the first paint, as a file of our own because the page allows no inline script. Sets the theme, so that
 * no white flash meets dark-adapted eyes, and asks for what the first screen needs while the application still loads.
 */
;(function () {
  var root = document.documentElement
  var theme
  try {
    theme = localStorage.getItem('halyard.theme')
  } catch {
    theme = null
  }
  if (theme !== 'day' && theme !== 'night') {
    theme = matchMedia('(prefers-color-scheme: dark)').matches ? 'night' : 'day'
  }
  root.dataset.theme = theme
  var colour = document.querySelector('meta[name="theme-color"]')
  if (colour) colour.content = theme === 'night' ? '#070503' : '#f3eee2'
})()

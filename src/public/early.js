/*
 * Runs before the first paint, as a file of our own because the page allows no inline script. Sets the theme, so that
 * no white flash meets dark-adapted eyes, and asks for what the first screen needs while the application still loads.
 */
;(function () {
  function stored(key) {
    try {
      return localStorage.getItem(key)
    } catch {
      return null
    }
  }

  function showTheme() {
    var theme = stored('halyard.theme')
    if (theme !== 'day' && theme !== 'night') {
      theme = matchMedia('(prefers-color-scheme: dark)').matches ? 'night' : 'day'
    }
    document.documentElement.dataset.theme = theme
    var colour = document.querySelector('meta[name="theme-color"]')
    if (colour) colour.content = theme === 'night' ? '#070503' : '#f3eee2'
  }

  function ask(path) {
    var answer = fetch(path, { headers: { Accept: 'application/json' }, credentials: 'same-origin' })
    // Who takes the answer hears of a failure; until then it must not count as unhandled.
    answer.catch(function () {})
    return { path: path, answer: answer }
  }

  /** The filters in the page's address carry the names of the endpoint; see `boardQuery`. */
  function boardPath() {
    var query = new URLSearchParams(location.search)
    query.delete('need')
    query.append('size', '200')
    return '/api/v1/board?' + query
  }

  /** The board's own chunks, named at build time in the page's head. */
  function preloadBoard() {
    var meta = document.querySelector('meta[name="board-chunks"]')
    if (!meta) return
    meta.content.split(' ').forEach(function (href) {
      var isStyle = href.slice(-4) === '.css'
      var link = document.createElement('link')
      link.rel = isStyle ? 'stylesheet' : 'modulepreload'
      link.crossOrigin = ''
      link.href = href
      document.head.append(link)
    })
  }

  showTheme()
  window.halyardEarly = { session: ask('/api/v1/session') }
  if (location.pathname === '/' && stored('halyard.signed-in')) {
    window.halyardEarly.board = ask(boardPath())
    preloadBoard()
  }
})()

/*
 * Runs before the first paint, as a file of our own because the page allows no inline script. Sets the theme, so that
 * no white flash meets dark-adapted eyes, asks for what the first screen needs while the application still loads, and
 * draws the sentence of the board as soon as it is there: on a slow line that is a second or two earlier.
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

  function json(early) {
    return early.answer.then(function (response) {
      if (!response.ok) throw new Error(response.status)
      return response.clone().json()
    })
  }

  function element(name, className, children) {
    var made = document.createElement(name)
    made.className = className
    made.append.apply(made, children)
    return made
  }

  /** The element of the application; the answers may be there before the page has been read so far. */
  function place() {
    return new Promise(function (resolve) {
      var found = document.getElementById('app')
      if (found) return resolve(found)
      var observer = new MutationObserver(function () {
        found = document.getElementById('app')
        if (!found) return
        observer.disconnect()
        resolve(found)
      })
      observer.observe(document.documentElement, { childList: true, subtree: true })
    })
  }

  /** In the frame that the application draws too: see `frame.css`. */
  function drawSentence(answers) {
    var sentence = answers[0].sentence
    var app = answers[2]
    if (app.firstChild) return
    window.halyardEarly.sentence = sentence
    var heading = element('h1', '', [element('b', '', [sentence.lead]), ' ' + sentence.rest])
    var isDemo = answers[1].member.group.demo
    if (isDemo) app.append(element('aside', 'frame-demo', ['Demonstration data: nothing here is real.']))
    app.append(
      element('header', 'frame-bar', []),
      element('main', 'frame-page', [element('div', 'board-sentence', [heading])]),
    )
  }

  showTheme()
  window.halyardEarly = { session: ask('/api/v1/session') }
  if (location.pathname === '/' && stored('halyard.signed-in')) {
    window.halyardEarly.board = ask(boardPath())
    preloadBoard()
    Promise.all([json(window.halyardEarly.board), json(window.halyardEarly.session), place()])
      .then(drawSentence)
      // Nothing is drawn early then; the application says what is wrong.
      .catch(function () {})
  }
})()

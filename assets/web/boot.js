// Runs before the first paint: puts the stored theme on the page and shows the first paint that fits the address.
(function () {
  var root = document.documentElement;
  var stored = null;
  var signedIn = false;
  try {
    stored = localStorage.getItem('dapple.theme');
    signedIn = localStorage.getItem('dapple.signed-in') === 'yes';
  } catch (forbidden) {
    // Without storage the page follows the system and starts at the front.
  }
  var dark = stored === 'dark' || (stored !== 'light' && matchMedia('(prefers-color-scheme: dark)').matches);
  root.dataset.theme = dark ? 'dark' : 'light';
  var themeColor = document.querySelector('meta[name="theme-color"]');
  if (themeColor) themeColor.content = dark ? '#0C1C18' : '#EDF2EA';
  // The server says with the page that it is a demonstration, so that the bar with its time keeps its place from the first paint on.
  if (/(^|; )dapple_demonstration=yes/.test(document.cookie)) root.dataset.demonstration = '';
  // Whoever is signed in starts in the yard and not at the front.
  if (location.pathname === '/' && signedIn) history.replaceState(null, '', '/home');
  // The build lists the app's scripts here and writes the front page; a page that is served while it is being developed has neither.
  var listed = document.currentScript && document.currentScript.dataset.scripts;
  root.dataset.start = location.pathname === '/' && listed ? 'front' : 'inside';

  // The front page is whole without the app: its links are plain ones. The app's code is only fetched there, when nothing else is, and runs with the
  // next page. Every other page starts it at once.
  var scripts = listed ? JSON.parse(listed) : [];
  if (root.dataset.start === 'inside') {
    addEventListener('DOMContentLoaded', function () {
      scripts.forEach(function (source) {
        var script = document.createElement('script');
        script.src = source;
        script.async = false; // In the order of the list.
        document.body.append(script);
      });
    });
  } else if (!(navigator.connection && navigator.connection.saveData)) {
    addEventListener('load', function () {
      (window.requestIdleCallback || setTimeout)(function () {
        scripts.forEach(function (source) {
          var ahead = document.createElement('link');
          ahead.rel = 'prefetch';
          ahead.as = 'script';
          ahead.href = source;
          document.head.append(ahead);
        });
      });
    });
  }

  // A page kept open over a new version may ask for code that is gone before any of ours runs: load anew, once.
  addEventListener('error', function (event) {
    var from = event.target;
    if (!(from instanceof HTMLScriptElement) || !document.getElementById('first-paint') || !navigator.onLine) return;
    try {
      var last = Number(sessionStorage.getItem('dapple.reloadedForChunk') || 0);
      if (Date.now() - last < 30000) return;
      sessionStorage.setItem('dapple.reloadedForChunk', String(Date.now()));
    } catch (forbidden) {
      return; // Nothing to remember the attempt by: better not to start a loop.
    }
    location.reload();
  }, true);
})();

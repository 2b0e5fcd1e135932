/* Before the first paint: the theme somebody chose here, else the system's. A file of its own, as inline scripts are forbidden. */
(function () {
  var key = 'lanewright.theme';
  var root = document.documentElement;
  var dark = window.matchMedia('(prefers-color-scheme: dark)');
  function chosen() {
    try {
      return localStorage.getItem(key);
    } catch {
      return null;
    }
  }
  function apply() {
    var choice = /\/wall\/?$/.test(location.pathname) ? 'dark' : chosen();
    var theme = choice === 'dark' || choice === 'light' ? choice : dark.matches ? 'dark' : 'light';
    root.dataset.theme = theme;
    var meta = document.querySelector('meta[name=theme-color]');
    if (meta) meta.setAttribute('content', theme === 'dark' ? '#10131a' : '#f3eee4');
  }
  apply();
  dark.addEventListener('change', apply);
  window.addEventListener('lanewright:theme', apply);
})();

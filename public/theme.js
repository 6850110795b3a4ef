// Runs before the first paint: the remembered theme, and the mark that scripts are there (styles/base.css).
// The key is the one of components/site/theme.ts.
(function () {
  var root = document.documentElement;
  root.setAttribute("data-script", "");
  try {
    var theme = localStorage.getItem("rimelight-theme");
    if (theme === "light" || theme === "dark") root.setAttribute("data-theme", theme);
  } catch (error) {
    // Storage is closed in this browser: the device's own theme stands.
  }
})();

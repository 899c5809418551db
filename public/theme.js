// Runs before first paint: theme and density as this device last chose them.
// A page that wants neither (the customer's page, a paper) is left alone by the stylesheet.
(() => {
  const root = document.documentElement;
  const read = (key) => {
    try {
      return localStorage.getItem(key);
    } catch {
      return null;
    }
  };
  const theme = read("fd-theme");
  const night = theme === "night" || (theme !== "day" && matchMedia("(prefers-color-scheme: dark)").matches);
  root.dataset.theme = night ? "night" : "day";
  const density = read("fd-density");
  if (density === "bay" || density === "counter") root.dataset.density = density;
})();

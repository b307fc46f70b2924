// Before the first paint, so that a chosen theme never flashes. Kept in step with src/ui/theme.ts.
try {
  const chosen = localStorage.getItem('farlug-theme');
  if (chosen === 'light' || chosen === 'dark') document.documentElement.dataset.theme = chosen;
} catch {}

// Runs before the first paint, so that a chosen light or dark theme does not flash the other.
// The choice is written by client/src/app/ui/theme-choice.ts under the same key.
try {
  const choice = localStorage.getItem('tn-theme');
  if (choice === 'light' || choice === 'dark') {
    document.documentElement.dataset.theme = choice;
  }
} catch {
  // Storage may be forbidden; the system's own preference holds then.
}

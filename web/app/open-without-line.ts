/** Registers the worker that opens the app without a line, and hands it the files this page was made of. */
export async function openWithoutLine(): Promise<void> {
  if (!import.meta.env.PROD || !('serviceWorker' in navigator)) return
  try {
    await navigator.serviceWorker.register('/sw.js')
    const { active } = await navigator.serviceWorker.ready
    active?.postMessage(performance.getEntriesByType('resource').map((entry) => entry.name))
  } catch {
    // Plain http in a local network has no workers: the app then needs the line to open, and says so.
  }
}

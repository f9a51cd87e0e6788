/** Registers the worker that opens the app without a line, and lets it keep the phone's pages as they are now. */
export async function openWithoutLine(): Promise<void> {
  if (!import.meta.env.PROD || !('serviceWorker' in navigator)) return
  try {
    await navigator.serviceWorker.register('/sw.js')
    const { active } = await navigator.serviceWorker.ready
    active?.postMessage('keep')
  } catch {
    // Plain http in a local network has no workers: the app then needs the line to open, and says so.
  }
}

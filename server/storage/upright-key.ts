/**
 * Where an upright JPEG of a page is kept that nobody could place, when browsers cannot show its file (HEIC, TIFF, PDF): a
 * clerk sets its corners on this picture. It goes when the page is read, and when consent is withdrawn.
 */
export const uprightKey = (pageId: string) => `uprights/${pageId}`

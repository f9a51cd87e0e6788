/**
 * Limits of what is taken in, as named numbers: the door, the forms, the columns and the texts use the same ones.
 * Limits of readings stand in shared/checks, with their sources.
 */

const MB = 1_000_000

/** Files that come through the door. Sizes in bytes, pixels counted as width x height. */
export const FILE_LIMITS = {
  photo_bytes: 25 * MB,
  photo_pixels: 50_000_000,
  pdf_bytes: 100 * MB,
  pdf_pages: 200,
  xlsx_bytes: 20 * MB,
  xlsx_unpacked_bytes: 200 * MB,
  /** Unpacked size over packed size; an honest workbook of 50,000 rows stays under 6. */
  xlsx_ratio: 100,
  xlsx_entries: 200,
  csv_bytes: 20 * MB,
  files_at_once: 20,
  name_chars: 200,
} as const

/**
 * The child process that opens a stranger's file. `resident_mb` counts what the heap's limit does not (buffers, WebAssembly):
 * a 50-megapixel picture in colour takes 150 MB, and reading it works on a few copies.
 */
export const PARSER_LIMITS = { heap_mb: 512, resident_mb: 1_500, time_s: 30 } as const

/** Free space under which nothing more is taken in: whichever is larger. */
export const DISK_LIMITS = { free_bytes: 2_000 * MB, free_share: 0.1 } as const

/** Passwords: length alone, no recipe of character kinds (NIST SP 800-63B-4 as quoted in ASVS issue 3242). */
export const PASSWORD_LIMITS = { min_chars: 15, max_chars: 128, hashes_at_once: 2 } as const

/** argon2id: 19 MiB, two passes, one lane (OWASP Password Storage sheet). */
export const ARGON2_COST = { memory_kib: 19 * 1024, passes: 2, lanes: 1 } as const

/** Sign-in and sending, counted across processes. */
export const RATE_LIMITS = { failures_per_min: 5, failures_per_h: 100, uploads_per_min: 60 } as const

/** How long an unused session lives. */
export const SESSION_IDLE = { admin_s: 30 * 60, desk_s: 8 * 3600, phone_s: 30 * 24 * 3600 } as const

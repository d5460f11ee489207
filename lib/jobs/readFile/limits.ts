/** Limits of one file's reading; past them its process is killed and the file refused with a sentence. */
export const MAX_PAGES = 60;
export const TIME_LIMIT_MS = 20_000;
/** On top of it for each page that is a picture; with the start they end before the job's own time (150 s) does. */
export const SCAN_TIME_MS = 10_000;
export const LONGEST_TIME_MS = 136_000;
export const MAX_SCANNED_PAGES = 12;
/** A page with fewer words has none to read; one with few is drawn as well if a picture covers it. */
export const NO_WORDS = 3;
export const FEW_WORDS = 40;
/** The program of a busy machine may take this long to start; the file's own time begins after it. */
export const START_LIMIT_MS = 30_000;
export const MEMORY_LIMIT_BYTES = 512 * 1024 * 1024;
/** Share of the memory given to script objects; the rest is for buffers and the program itself. */
export const HEAP_LIMIT_MB = 320;
export const MEMORY_CHECK_MS = 50;

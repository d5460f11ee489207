/** Limits of one file's reading; past them its process is killed and the file refused with a sentence. */
export const MAX_PAGES = 60;
export const TIME_LIMIT_MS = 20_000;
/** The program of a busy machine may take this long to start; the file's own time begins after it. */
export const START_LIMIT_MS = 30_000;
export const MEMORY_LIMIT_BYTES = 512 * 1024 * 1024;
/** Share of the memory given to script objects; the rest is for buffers and the program itself. */
export const HEAP_LIMIT_MB = 320;
export const MEMORY_CHECK_MS = 100;

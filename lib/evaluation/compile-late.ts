import { setFlagsFromString } from 'node:v8';

/**
 * Imported before anything else of a child. A line takes about a millisecond and passes through much code, little of it
 * often: as the run time has it, optimizing that code (and again after each of its guesses failed) took more processor
 * time than a fresh child's first thousand lines do without. Code is optimized once it has run twenty times as long; the
 * inner loops of a heavy line are there within some ten milliseconds all the same. A run time that does not know the
 * flag leaves it.
 */
setFlagsFromString('--interrupt-budget=1500000');

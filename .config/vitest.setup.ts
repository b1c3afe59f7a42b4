import fc from 'fast-check';

/** Every property draws the same cases on every machine; a failure prints the seed and the path to its smallest case. */
fc.configureGlobal({ seed: 1729 });

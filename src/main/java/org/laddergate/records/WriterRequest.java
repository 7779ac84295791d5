package org.laddergate.records;

/** What may stand in the queue of the writer thread. */
sealed interface WriterRequest permits AppendRequest, Errand {}

package org.laddergate.records;

import java.util.List;

/**
 * A batch that is on disk.
 *
 * @param answers        one per request, in order: completes its future when run
 * @param storedVerdicts how many of the requests were new
 */
record BatchResult(List<Runnable> answers, int storedVerdicts) {}

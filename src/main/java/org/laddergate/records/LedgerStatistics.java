package org.laddergate.records;

/**
 * What the ledger has done since it was opened; counters never fall.
 *
 * @param commits            successful commits
 * @param committedRequests  appends answered by those commits, repeats and conflicts included
 * @param storedVerdicts     new verdicts among them
 * @param failedBatches      commits that failed and were rolled back
 * @param refusedRequests    appends answered with unavailable: queue full, closed, or part of a failed batch
 * @param lastBatchSize      appends in the last successful commit; 0 before the first
 * @param lastCommitNanos    duration of the last successful commit, from BEGIN to COMMIT [ns]
 * @param totalCommitNanos   sum of these durations [ns]
 * @param queueDepth         appends waiting now
 */
public record LedgerStatistics(long commits, long committedRequests, long storedVerdicts, long failedBatches,
        long refusedRequests, int lastBatchSize, long lastCommitNanos, long totalCommitNanos, int queueDepth) {

    static final LedgerStatistics NONE = new LedgerStatistics(0, 0, 0, 0, 0, 0, 0, 0, 0);

    /** Appends per commit; 0 before the first commit. */
    public double meanBatchSize() {
        return commits == 0 ? 0 : (double) committedRequests / commits;
    }

    LedgerStatistics plusCommit(int requests, int stored, long nanos) {
        return new LedgerStatistics(commits + 1, committedRequests + requests, storedVerdicts + stored, failedBatches,
                refusedRequests, requests, nanos, totalCommitNanos + nanos, queueDepth);
    }

    LedgerStatistics plusFailedBatch() {
        return new LedgerStatistics(commits, committedRequests, storedVerdicts, failedBatches + 1, refusedRequests,
                lastBatchSize, lastCommitNanos, totalCommitNanos, queueDepth);
    }

    LedgerStatistics now(long refused, int depth) {
        return new LedgerStatistics(commits, committedRequests, storedVerdicts, failedBatches, refused,
                lastBatchSize, lastCommitNanos, totalCommitNanos, depth);
    }
}

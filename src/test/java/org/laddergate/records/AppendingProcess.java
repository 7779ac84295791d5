package org.laddergate.records;

import java.nio.file.Path;
import java.time.Clock;
import org.laddergate.screening.Judgement;

/** A process that appends until it is killed and prints each verdict it was promised: "id sequence;". */
final class AppendingProcess {
    static final int THREADS = 8;

    private AppendingProcess() {}

    public static void main(String[] args) {
        Judgement judgement = new RandomVerdicts(1).typicalJudgement();
        SqliteLedger ledger = SqliteLedger.open(Path.of(args[0]), Clock.systemUTC());
        for (int t = 0; t < THREADS; t++) {
            int thread = t;
            new Thread(() -> appendForEver(ledger, thread, judgement)).start();
        }
    }

    private static void appendForEver(SqliteLedger ledger, int thread, Judgement judgement) {
        for (int n = 0;; n++) {
            String id = "t" + thread + "-" + n;
            long sequence = Ledgers.await(ledger.append(
                    RandomVerdicts.measurement(id, "hb40", "s" + n % 5), "a".repeat(64), judgement)).sequence();
            synchronized (AppendingProcess.class) {
                System.out.print(id + " " + sequence + ";\n");
                System.out.flush();
            }
        }
    }
}

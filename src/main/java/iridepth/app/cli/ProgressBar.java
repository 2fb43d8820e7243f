package iridepth.app.cli;

import java.io.PrintStream;
import java.util.function.LongConsumer;

/** A line that tells how far long work has come: on a terminal only, after a second, and gone when the work is done. */
final class ProgressBar implements LongConsumer, AutoCloseable {
    private static final long QUIET_NS = 1_000_000_000L;
    private static final long BETWEEN_NS = 100_000_000L;
    private static final int WIDTH = 40;

    private final String what;
    private final long total;
    private final PrintStream terminal;
    private final long start = System.nanoTime();
    private long shown = Long.MIN_VALUE;

    ProgressBar(String what, long total) {
        this.what = what;
        this.total = total;
        this.terminal = System.console() == null ? null : System.err;
    }

    @Override
    public synchronized void accept(long done) {
        long now = System.nanoTime();
        if (terminal == null || now - start < QUIET_NS || shown != Long.MIN_VALUE && now - shown < BETWEEN_NS) {
            return;
        }
        shown = now;
        int filled = (int) (WIDTH * done / Math.max(1, total));
        terminal.printf("\r%s [%s%s] %3d %%", what, "=".repeat(filled), " ".repeat(WIDTH - filled), 100 * done / Math.max(1, total));
        terminal.flush();
    }

    @Override
    public void close() {
        if (shown != Long.MIN_VALUE) {
            terminal.print("\r" + " ".repeat(what.length() + WIDTH + 9) + "\r");
            terminal.flush();
        }
    }
}

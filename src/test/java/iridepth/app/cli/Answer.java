package iridepth.app.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.PrintWriter;
import java.io.StringWriter;
import java.util.Arrays;

/** What a command line is answered: exit code and what it prints. */
record Answer(int code, String out, String err) {
    /** Runs a command line that must succeed, or end with the verdict 1. */
    static Answer to(Object... args) {
        Answer answer = any(args);
        assertTrue(answer.code <= 1, answer.err);
        return answer;
    }

    /** Runs a command line that must be refused with an exit code and one line that holds the reason. */
    static void refusal(int code, String reason, Object... args) {
        Answer answer = any(args);
        assertEquals(code, answer.code, answer.err + answer.out);
        assertEquals(1, answer.err.lines().count(), answer.err);
        assertTrue(answer.err.contains(reason), answer.err);
        assertFalse(answer.err.contains("\tat "), answer.err);
    }

    /** Runs a command line, whatever becomes of it. */
    static Answer any(Object... args) {
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        int code = Iridepth.run(new PrintWriter(out), new PrintWriter(err),
                Arrays.stream(args).map(Object::toString).toArray(String[]::new));
        return new Answer(code, out.toString(), err.toString());
    }
}

package iridepth.app.cli;

import iridepth.photo.PhotoException;
import iridepth.recipe.RecipeException;
import iridepth.report.OutputException;
import java.io.PrintWriter;
import java.util.Locale;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.IVersionProvider;
import picocli.CommandLine.Option;
import picocli.CommandLine.ScopeType;

/** The command line: {@code java -jar iridepth.jar COMMAND}. */
@Command(name = "iridepth", mixinStandardHelpOptions = true, versionProvider = Iridepth.Version.class,
        synopsisSubcommandLabel = "COMMAND",
        description = "Reads the thickness of a thin transparent film from its interference colour, pixel by pixel.",
        footer = {"", "Exit codes: 0 done; 1 done, and out of tolerance; 2 command line or recipe wrong; 3 an input cannot be "
            + "used; 4 output cannot be written.", "", Iridepth.CAUTION},
        subcommands = {ChartCommand.class, CalibrateCommand.class, MapCommand.class, ProfileCommand.class, MeasureCommand.class,
            ContoursCommand.class, LotCommand.class, SequenceCommand.class, PlanCommand.class, CompareCommand.class, RepeatCommand.class, MaterialsCommand.class})
public final class Iridepth {
    /** What stands below every result. */
    static final String CAUTION = "An estimate from colour is no certified measurement: check against a reference instrument "
            + "before you accept or reject parts on which safety depends, and follow local rules for chemicals, lamps and lasers.";
    static final int DONE = 0;
    static final int OUT_OF_TOLERANCE = 1;
    static final int WRONG_REQUEST = 2;
    static final int UNUSABLE_INPUT = 3;
    static final int UNWRITABLE_OUTPUT = 4;

    @Option(names = "--debug", scope = ScopeType.INHERIT, description = "Show a stack trace with an error.")
    private boolean debug;

    /** Version of the program, from the jar's manifest. */
    public static final class Version implements IVersionProvider {
        @Override
        public String[] getVersion() {
            return new String[] {"iridepth " + number()};
        }

        static String number() {
            String version = Iridepth.class.getPackage().getImplementationVersion();
            return version == null ? "(not packaged)" : version;
        }
    }

    /** Runs a command and leaves with its exit code. */
    public static void main(String[] args) {
        System.setProperty("java.awt.headless", "true");
        System.exit(run(new PrintWriter(System.out, true), new PrintWriter(System.err, true), args));
    }

    /** Runs a command and returns its exit code. */
    static int run(PrintWriter out, PrintWriter err, String... args) {
        Locale.setDefault(Locale.ROOT);
        Iridepth program = new Iridepth();
        CommandLine line = new CommandLine(program).setOut(out).setErr(err);
        line.setParameterExceptionHandler((e, given) -> {
            e.getCommandLine().getErr().println(e.getCommandLine().getCommandName() + ": " + firstLine(e.getMessage())
                    + " (see --help)");
            return WRONG_REQUEST;
        });
        line.setExecutionExceptionHandler((e, command, parsed) -> {
            command.getErr().println(command.getCommandName() + ": " + message(e));
            if (program.debug) {
                e.printStackTrace(command.getErr());
            }
            return exitCode(e);
        });
        return line.execute(args.length == 0 ? new String[] {"--help"} : args);
    }

    private static int exitCode(Throwable e) {
        if (e instanceof RecipeException || e instanceof IllegalArgumentException) {
            return WRONG_REQUEST;
        }
        return e instanceof OutputException ? UNWRITABLE_OUTPUT : UNUSABLE_INPUT;
    }

    /** What an error says, in one line. */
    static String message(Throwable e) {
        boolean ours = e instanceof RecipeException || e instanceof PhotoException || e instanceof OutputException
                || e instanceof IllegalArgumentException;
        if (e instanceof OutOfMemoryError) {
            return "out of memory; give Java more with -Xmx, as in 'java -Xmx4g -jar iridepth.jar ...'";
        }
        return ours ? firstLine(e.getMessage()) : "unexpected " + e + "; please report it with the output of --debug";
    }

    private static String firstLine(String message) {
        return message == null ? "no further detail" : message.lines().findFirst().orElse("no further detail");
    }
}

package iridepth.app.cli;

import iridepth.calibration.StepDesign;
import iridepth.colour.Light;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Materials;
import iridepth.optics.Stack;
import iridepth.planning.Camera;
import iridepth.planning.Forecast;
import iridepth.planning.LightChoice;
import iridepth.planning.Plan;
import iridepth.planning.Plan.Films;
import iridepth.planning.Plan.Subject;
import iridepth.recipe.LightSpec;
import iridepth.recipe.MeasuredRig;
import iridepth.recipe.Recipe;
import iridepth.recipe.Recipe.ViewSpec;
import iridepth.report.PlanSheet;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Option;
import picocli.CommandLine.Spec;

/** {@code plan}: what a rig will tell of a film, before any photo. */
@Command(name = "plan", mixinStandardHelpOptions = true,
        description = {"Tells before any photo what a rig can do for a film: the uncertainty to expect at each thickness, the "
            + "thicknesses that it confuses, which light does better, and the films to calibrate with.", "",
            "All figures are for single pixels, without the help that map takes from their neighbours. Several --light are "
                + "compared, each alone and in pairs read jointly; the figure is for the best of them alone. A camera of which "
                + "nothing is known is taken as a generic sensor with three smooth lobes, and its calibration as one with the "
                + "films that are proposed. Give a recipe whose flat and steps are photographed, and the plan rests on these; give "
                + "--full-well too if they are means of several exposures, which are quieter than the part's photo.", "",
            "Examples:",
            "  plan --stack \"air / SiO2 / Si\" --range 0:500 --light 3200K --aperture 0.2 --out plan.png",
            "  plan --stack \"air / SiO2 / Si\" --range 0:1500 --light A --light LED-B4 --light D65",
            "  plan --stack \"air / SiO2 / Si\" --range 0:1500 --camera mono --light 450nm+-5nm --light 546nm+-5nm --light "
                + "650nm+-5nm",
            "  plan --recipe oxide.toml", ""},
        footer = {"", Iridepth.CAUTION})
final class PlanCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Option(names = "--stack", paramLabel = "STACK", description = "The stack, as in \"air / SiO2 / Si\".")
    private String stack;

    @Option(names = "--recipe", paramLabel = "FILE", description = "Take stack, range, view, light and camera "
            + "from a recipe; other options depart from it.")
    private Path recipe;

    @Option(names = "--range", paramLabel = "FROM:TO", description = "Thicknesses in nm, as in 0:500.")
    private String range;

    @Option(names = "--light", paramLabel = "LIGHT", description = "CIE illuminant, a black body as 3200K, a "
            + "band as 546nm+-5nm, or a CSV file; repeat it to compare lights.")
    private List<String> lights = new ArrayList<>();

    @Option(names = "--jointly", description = "Plan for one photo under each light, all read jointly.")
    private boolean jointly;

    @Option(names = "--misfit", paramLabel = "CHI2", description = "Chi-square up to which two thicknesses "
            + "count as confusable (default: 16, at which a pixel takes the wrong one in 2.3 %% of cases; 9: 6.7 %%).")
    private double limit = Forecast.USUAL_LIMIT;

    @Option(names = "--steps", paramLabel = "N", description = "How many films to calibrate with (default: as "
            + "many as pay).")
    private int steps;

    @Option(names = "--films", split = ",", paramLabel = "NM", description = "Thicknesses of the films at hand, "
            + "as in 20,60,110, to choose the steps from (default: any).")
    private double[] films = new double[0];

    @Option(names = "--step-uncertainty", paramLabel = "NM", defaultValue = "0.5", description = "Standard "
            + "uncertainty of the steps' thickness by the reference instrument, nm (default: 0.5).")
    private double stepUncertainty;

    @Option(names = "--shown", paramLabel = "FROM:TO", description = "With a recipe whose steps are photographed: thicknesses that "
            + "the part's photo will show, on which map refines the calibration (default: hardly more than one).")
    private String shown;

    @Mixin
    private OptionalPicture output;

    @Mixin
    private ViewOptions viewOptions;

    @Mixin
    private CameraOptions cameraOptions;

    @Override
    public Integer call() {
        Recipe given = recipe == null ? null : Recipe.read(recipe);
        if (given == null && (stack == null || range == null)) {
            throw new IllegalArgumentException("give --stack and --range, or --recipe");
        }
        PlanSheet sheet = sheet(given);
        PrintWriter terminal = spec.commandLine().getOut();
        Optional<String> written = output.write(sheet::write, sheet.csv());
        terminal.print(sheet.text());
        written.ifPresent(terminal::println);
        terminal.println(Iridepth.CAUTION);
        terminal.flush();
        return Iridepth.DONE;
    }

    private PlanSheet sheet(Recipe given) {
        Stack film = stack == null ? given.stack() : Stack.parse(stack, Materials.bundled());
        film.filmIndex();
        ThicknessRange nm = range == null ? given.range() : ThicknessRange.parse(range);
        nm.requireResolved(film);
        ViewSpec viewSpec = viewOptions.given() || given == null ? viewOptions.spec() : given.view();
        Optional<Stack> flat = Optional.ofNullable(given == null ? null : given.camera().flatStack());
        Subject subject = new Subject(film, flat, viewSpec.view(film, nm.toNm()), nm);
        String title = String.format(Locale.ROOT, "Plan for %s, %.0f to %.0f nm", film, nm.fromNm(), nm.toNm());
        boolean asGiven = given != null && lights.isEmpty() && stack == null && range == null && !cameraOptions.given()
                && !viewOptions.given();
        Optional<MeasuredRig> measured = asGiven ? MeasuredRig.of(given, cameraOptions.known(given.camera()),
                Optional.ofNullable(shown).map(ThicknessRange::parse)) : Optional.empty();
        return measured.isPresent() ? measured(title, given, subject, measured.get()) : supposed(title, given, subject);
    }

    private PlanSheet supposed(String title, Recipe given, Subject subject) {
        boolean own = given != null && lights.isEmpty();
        List<Light> sources = own ? given.lights() : lights.isEmpty() ? List.of(Light.illuminant("D65"))
                : lights.stream().map(LightSpec::parse).toList();
        Camera camera = cameraOptions.camera(given == null ? null : given.camera());
        Plan plan = jointly || own ? Plan.jointly(camera, subject, sources, limit, films())
                : Plan.compare(camera, subject, sources, limit, films());
        List<String> conditions = new ArrayList<>(List.of(subject.view().text(), camera.text()));
        if (camera.generic()) {
            conditions.add("calibrated with the steps proposed" + (plan.ranked().isEmpty() ? ""
                    : "; lights are compared without regard to calibration"));
        }
        return new PlanSheet(title, conditions, plan, limit);
    }

    /** The plan for a rig as its own photos show it; with steps asked for, the best steps stand beside it. */
    private PlanSheet measured(String title, Recipe given, Subject subject, MeasuredRig rig) {
        LightChoice.Option option = LightChoice.Option.of(given.lights(), rig.curve(), rig.noise(), limit);
        List<String> conditions = List.of(subject.view().text(), "camera as its flat" + (given.camera().steps().isEmpty() ? ""
                : " and its " + given.camera().steps().size() + " steps") + " show it: " + rig.noiseModel());
        Optional<StepDesign> design = Optional.empty();
        if (steps > 0 || films.length > 0) {
            Camera generic = Camera.genericColour(rig.noiseModel(), rig.encoding(), 0.8);
            design = Plan.jointly(generic, subject, given.lights(), limit, films()).design();
        }
        return new PlanSheet(title, conditions, new Plan(option, List.of(), design), limit);
    }

    private Films films() {
        return new Films(stepUncertainty, films, steps);
    }
}

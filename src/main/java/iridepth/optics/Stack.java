package iridepth.optics;

import java.util.ArrayList;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * Ambient / layers / substrate, in the order in which light meets them. Ambient and substrate are semi-infinite.
 *
 * @param ambient   the medium that the light comes from; its absorption is neglected
 * @param layers    the inner layers, at most one of them the film
 * @param substrate the medium behind them
 */
public record Stack(Material ambient, List<Layer> layers, Material substrate) {
    private static final Pattern PART = Pattern.compile("(\\S+?)((?:\\s+[nk]\\s*=\\s*[-+.\\deE]+)*)(?:\\s+([-+.\\deE]+)\\s*(nm|um|\u00b5m|\u03bcm))?");
    private static final Pattern CONSTANT = Pattern.compile("([nk])\\s*=\\s*([-+.\\deE]+)");
    private static final String FORM = "write it as 'air / SiO2 / Si' or 'air / PMMA / SiO2 300 nm / Si'";

    /**
     * Checks the stack.
     *
     * @throws IllegalArgumentException if more than one layer has no thickness
     */
    public Stack {
        layers = List.copyOf(layers);
        if (layers.stream().filter(Layer::isFilm).count() > 1) {
            throw new IllegalArgumentException("two layers have no thickness (" + String.join(", ",
                    layers.stream().filter(Layer::isFilm).map(l -> l.material().name()).toList())
                    + "); only the film may be unknown, so give the others theirs, as in 'SiO2 300 nm'");
        }
    }

    /**
     * Reads a stack from its notation: media from ambient to substrate with slashes between. An inner medium with a thickness
     * (nm or um) is a fixed layer; the one without is the film. A constant index may stand behind any name: {@code oil n=1.47},
     * {@code ink n=1.6 k=0.02 40 nm}.
     *
     * @throws IllegalArgumentException if the text is no stack or names an unknown material
     */
    public static Stack parse(String text, Materials materials) {
        String[] parts = text.split("/", -1);
        if (parts.length < 2) {
            throw new IllegalArgumentException("stack '" + text + "': needs at least an ambient and a substrate; " + FORM);
        }
        List<Layer> all = new ArrayList<>();
        for (String part : parts) {
            all.add(layer(text, part.strip(), materials));
        }
        Layer ambient = all.get(0);
        Layer substrate = all.get(all.size() - 1);
        if (!ambient.isFilm() || !substrate.isFilm()) {
            throw new IllegalArgumentException("stack '" + text + "': ambient and substrate are taken as thick and have no "
                    + "thickness; " + FORM);
        }
        return new Stack(ambient.material(), all.subList(1, all.size() - 1), substrate.material());
    }

    private static Layer layer(String stack, String part, Materials materials) {
        Matcher m = PART.matcher(part);
        if (part.isEmpty() || !m.matches()) {
            throw new IllegalArgumentException("stack '" + stack + "': cannot read " + (part.isEmpty() ? "an empty medium"
                    : "'" + part + "'") + "; " + FORM);
        }
        String name = m.group(1);
        Material material = m.group(2).isEmpty() ? materials.get(name) : constant(stack, name, m.group(2));
        double thickness = Double.NaN;
        if (m.group(3) != null) {
            thickness = number(stack, m.group(3)) * (m.group(4).equals("nm") ? 1 : 1000);
        }
        return new Layer(material, thickness);
    }

    private static Material constant(String stack, String name, String text) {
        double n = Double.NaN;
        double k = 0;
        Matcher m = CONSTANT.matcher(text);
        while (m.find()) {
            if (m.group(1).equals("n")) {
                n = number(stack, m.group(2));
            } else {
                k = number(stack, m.group(2));
            }
        }
        if (Double.isNaN(n)) {
            throw new IllegalArgumentException("stack '" + stack + "': " + name + " has k but no n; write 'n=1.5 k=0.01'");
        }
        return Material.constant(name + text.replaceAll("\\s*=\\s*", "="), n, k);
    }

    private static double number(String stack, String text) {
        try {
            return Double.parseDouble(text);
        } catch (NumberFormatException e) {
            throw new IllegalArgumentException("stack '" + stack + "': '" + text + "' is not a number");
        }
    }

    /** Whether a layer's thickness is to be read. */
    public boolean hasFilm() {
        return layers.stream().anyMatch(Layer::isFilm);
    }

    /**
     * Place of the film among the layers.
     *
     * @throws IllegalArgumentException if no layer is unknown
     */
    public int filmIndex() {
        for (int i = 0; i < layers.size(); i++) {
            if (layers.get(i).isFilm()) {
                return i;
            }
        }
        throw new IllegalArgumentException("the stack " + this + " has no film: leave out the thickness of the layer that is "
                + "to be read");
    }

    /** The film's material. */
    public Material film() {
        return layers.get(filmIndex()).material();
    }

    /** This stack without its film: what is seen where there is none. */
    public Stack bare() {
        return new Stack(ambient, layers.stream().filter(layer -> !layer.isFilm()).toList(), substrate);
    }

    /** This stack with the film given a thickness in nm. */
    public Stack withFilm(double thicknessNm) {
        List<Layer> fixed = new ArrayList<>(layers);
        fixed.set(filmIndex(), new Layer(film(), thicknessNm));
        return new Stack(ambient, fixed, substrate);
    }

    /** This stack with the film made of another material. */
    public Stack withFilm(Material material) {
        List<Layer> changed = new ArrayList<>(layers);
        changed.set(filmIndex(), new Layer(material, Double.NaN));
        return new Stack(ambient, changed, substrate);
    }

    /** All media in the order in which light meets them. */
    public List<Material> media() {
        List<Material> media = new ArrayList<>();
        media.add(ambient);
        layers.forEach(l -> media.add(l.material()));
        media.add(substrate);
        return media;
    }

    /** The stack in its notation. */
    @Override
    public String toString() {
        StringBuilder text = new StringBuilder(ambient.name());
        for (Layer layer : layers) {
            text.append(" / ").append(layer.material().name());
            if (!layer.isFilm()) {
                double nm = layer.thicknessNm();
                text.append(' ').append(nm == Math.rint(nm) ? String.valueOf((long) nm) : String.valueOf(nm)).append(" nm");
            }
        }
        return text.append(" / ").append(substrate.name()).toString();
    }
}

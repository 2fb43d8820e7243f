package iridepth.app.cli;

public final class Iridepth {
    private Iridepth() {
    }

    public static void main(String[] args) {
        System.out.println("iridepth");
    }
}

package iridepth.recipe;

/** A recipe, or what a command line says in its place, is wrong. The message is one line: where, what, and what to do. */
public final class RecipeException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    /** An error with its message. */
    public RecipeException(String message) {
        super(message);
    }
}

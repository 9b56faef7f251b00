package fieldwright.cli;

/** Entry point of the program. */
public final class Main {
    private Main() { }

    public static void main(String[] arguments) {
        System.out.println("fieldwright");
    }
}

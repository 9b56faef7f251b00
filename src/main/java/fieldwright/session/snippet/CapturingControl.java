package fieldwright.session.snippet;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Collectors;
import jdk.jshell.execution.DirectExecutionControl;
import jdk.jshell.spi.ExecutionControl;
import jdk.jshell.spi.ExecutionControlProvider;
import jdk.jshell.spi.ExecutionEnv;

/**
 * The execution engine given to JShell: it keeps what JShell would load and notes what JShell would run, and runs
 * nothing. Running is the affair of {@link Workspace}, the same way the first time and every further time.
 */
final class CapturingControl extends DirectExecutionControl {
    private final ClassStore store;
    private final Set<String> classes = new HashSet<>();
    private final List<String> invoked = new ArrayList<>();
    private int redefinitions;

    CapturingControl(ClassStore store) {
        this.store = store;
    }

    ExecutionControlProvider provider() {
        return new ExecutionControlProvider() {
            @Override
            public String name() {
                return "fieldwright";
            }

            @Override
            public ExecutionControl generate(ExecutionEnv environment, Map<String, String> parameters) {
                return CapturingControl.this;
            }
        };
    }

    void forget() {
        classes.clear();
        invoked.clear();
    }

    /** Outermost classes loaded since {@link #forget()}. */
    Set<String> wrappers() {
        return classes.stream().map(CapturingControl::outermost).collect(Collectors.toSet());
    }

    /** Classes whose code JShell wanted to run since {@link #forget()}. */
    List<String> invoked() {
        return List.copyOf(invoked);
    }

    @Override
    public void load(ClassBytecodes[] compiled) {
        for (ClassBytecodes one : compiled) {
            store.add(one.name(), one.bytecodes());
            classes.add(one.name());
        }
    }

    /** Class files cannot be exchanged; JShell then takes another name for the class and compiles again. */
    @Override
    public void redefine(ClassBytecodes[] changed) throws NotImplementedException {
        redefinitions++;
        throw new NotImplementedException("redefine");
    }

    /** How often JShell had to compile again because of {@link #redefine}; for tests. */
    int redefinitions() {
        return redefinitions;
    }

    @Override
    public String invoke(String className, String methodName) {
        invoked.add(className);
        return "";
    }

    /** {@code REPL.$JShell$12} of {@code REPL.$JShell$12$K}. */
    private static String outermost(String name) {
        int afterNumber = name.indexOf('$', name.indexOf("$JShell$") + "$JShell$".length());
        return afterNumber < 0 ? name : name.substring(0, afterNumber);
    }
}

package fieldwright.session.snippet;

import java.lang.reflect.Field;
import java.lang.reflect.InvocationTargetException;
import java.lang.reflect.Method;
import java.lang.reflect.Modifier;
import java.util.Arrays;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Objects;

/**
 * Runs compiled snippets over classes of its own, so that two workspaces know nothing of each other. Compiles nothing.
 *
 * <p>It moves the values of the variables: what a snippet declares or assigns is read from its static field, and before
 * the next one runs, every variable has its value in every place where code looks for it.
 *
 * <p>For one thread at a time.
 */
public final class Workspace {
    private static final String METHOD = "do_it$";

    private final SnippetCompiler compiler;
    private final SnippetLoader loader;
    private final Map<String, Class<?>> classes = new HashMap<>();
    private final Map<String, Method> methods = new HashMap<>();
    private final Map<String, Field> fields = new HashMap<>();
    private final Map<Declaration.Variable, Object> values = new LinkedHashMap<>();

    public Workspace(SnippetCompiler compiler) {
        this.compiler = compiler;
        this.loader = new SnippetLoader(compiler.store());
    }

    /** The value of a variable; null when it has none. */
    public Object value(Declaration.Variable variable) {
        return values.get(variable);
    }

    /** Gives a variable its value for everything that runs from now on. */
    public void set(Declaration.Variable variable, Object value) {
        values.put(variable, value);
    }

    /** Forgets all values. */
    public void clear() {
        for (Declaration.Variable variable : values.keySet()) {
            compiler.slots(variable).forEach(slot -> put(field(slot, variable.name()), null));
        }
        values.clear();
    }

    /**
     * Runs a snippet as if for the first time.
     *
     * @return the variables it gave another value, the one it declares always among them
     * @throws Throwable whatever the author's code throws
     */
    public Map<Declaration.Variable, Object> run(CompiledSnippet snippet) throws Throwable {
        values.forEach(this::fillSlots);
        for (Field field : type(snippet.wrapper()).getDeclaredFields()) {
            if (Modifier.isStatic(field.getModifiers()) && !Modifier.isFinal(field.getModifiers())) {
                field.setAccessible(true);
                put(field, null);
            }
        }
        try {
            method(snippet.wrapper()).invoke(null);
        } catch (InvocationTargetException e) {
            throw e.getCause();
        }
        return written(snippet);
    }

    private Map<Declaration.Variable, Object> written(CompiledSnippet snippet) {
        Map<Declaration.Variable, Object> written = new LinkedHashMap<>();
        values.forEach((variable, before) -> {
            for (String slot : compiler.slots(variable)) {
                Object now = get(field(slot, variable.name()));
                if (!isSame(now, before)) {
                    written.put(variable, now);
                }
            }
        });
        if (snippet.declares() instanceof Declaration.Variable variable) {
            written.put(variable, get(field(snippet.wrapper(), snippet.field())));
        }
        values.putAll(written);
        return written;
    }

    /** The same object; of boxed primitives, which are boxed anew each time, the same value. */
    private static boolean isSame(Object a, Object b) {
        boolean boxed = a instanceof Number || a instanceof Boolean || a instanceof Character;
        return a == b || boxed && Objects.equals(a, b);
    }

    private void fillSlots(Declaration.Variable variable, Object value) {
        compiler.slots(variable).forEach(slot -> put(field(slot, variable.name()), value));
    }

    /**
     * True when a class declared in this snippet, or hidden in it, keeps something in static fields of its own, so that
     * running it again in the same workspace would not be like the first time.
     */
    public boolean keepsState(CompiledSnippet snippet) {
        return snippet.classes().stream().filter(name -> !name.equals(snippet.wrapper()))
                .flatMap(name -> Arrays.stream(type(name).getDeclaredFields()))
                .anyMatch(field -> Modifier.isStatic(field.getModifiers()) && !field.isSynthetic() && !isConstant(field));
    }

    /** Nothing behind it can change: a final primitive, a final string, a constant of an enum. */
    private static boolean isConstant(Field field) {
        Class<?> type = field.getType();
        return Modifier.isFinal(field.getModifiers()) && (type.isPrimitive() || type == String.class || field.isEnumConstant());
    }

    private Class<?> type(String wrapper) {
        return classes.computeIfAbsent(wrapper, name -> {
            try {
                return loader.loadClass(name);
            } catch (ClassNotFoundException e) {
                throw new IllegalStateException(e);
            }
        });
    }

    private Method method(String wrapper) {
        return methods.computeIfAbsent(wrapper, name -> {
            try {
                Method method = type(name).getDeclaredMethod(METHOD);
                method.setAccessible(true);
                return method;
            } catch (NoSuchMethodException e) {
                throw new IllegalStateException(e);
            }
        });
    }

    private Field field(String wrapper, String name) {
        return fields.computeIfAbsent(wrapper + "." + name, key -> {
            try {
                Field field = type(wrapper).getDeclaredField(name);
                field.setAccessible(true);
                return field;
            } catch (NoSuchFieldException e) {
                throw new IllegalStateException(e);
            }
        });
    }

    private static Object get(Field field) {
        try {
            return field.get(null);
        } catch (IllegalAccessException e) {
            throw new IllegalStateException(e);
        }
    }

    private static void put(Field field, Object value) {
        try {
            field.set(null, value == null && field.getType().isPrimitive() ? zero(field.getType()) : value);
        } catch (IllegalAccessException e) {
            throw new IllegalStateException(e);
        }
    }

    private static Object zero(Class<?> primitive) {
        return java.lang.reflect.Array.get(java.lang.reflect.Array.newInstance(primitive, 1), 0);
    }
}

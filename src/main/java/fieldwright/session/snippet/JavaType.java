package fieldwright.session.snippet;

import java.lang.reflect.GenericArrayType;
import java.lang.reflect.ParameterizedType;
import java.lang.reflect.Type;
import java.lang.reflect.WildcardType;
import java.util.Arrays;
import java.util.stream.Collectors;

/** A type as Java text with full names, fit to declare another variable of it. */
final class JavaType {

    private JavaType() { }

    static String text(Type type) {
        if (type instanceof Class<?> simple) {
            return text(simple);
        }
        if (type instanceof ParameterizedType generic) {
            return text(generic.getRawType()) + Arrays.stream(generic.getActualTypeArguments()).map(JavaType::text)
                    .collect(Collectors.joining(", ", "<", ">"));
        }
        if (type instanceof GenericArrayType array) {
            return text(array.getGenericComponentType()) + "[]";
        }
        if (type instanceof WildcardType wildcard) {
            return wildcard.getLowerBounds().length > 0 ? "? super " + text(wildcard.getLowerBounds()[0])
                    : "? extends " + text(wildcard.getUpperBounds()[0]);
        }
        throw new IllegalArgumentException("a variable of type " + type.getTypeName());
    }

    /** A class without a name, and JShell's stand-in for one, is known below by what it extends or implements. */
    private static String text(Class<?> simple) {
        if (simple.isArray()) {
            return text(simple.getComponentType()) + "[]";
        }
        if (simple.getCanonicalName() != null && !simple.getName().contains("$JShell$anonymous$")) {
            return simple.getCanonicalName();
        }
        Type[] interfaces = simple.getGenericInterfaces();
        return text(interfaces.length > 0 ? interfaces[0] : simple.getGenericSuperclass());
    }
}

package fieldwright.session;

import java.lang.reflect.RecordComponent;
import java.math.BigDecimal;
import java.math.BigInteger;
import java.util.Collection;
import java.util.List;
import java.util.Map;
import java.util.Set;

/** Tells objects that cannot change from those that may. Doubt counts as "may". */
final class Constancy {
    private static final Set<Class<?>> CONSTANT = Set.of(String.class, Boolean.class, Character.class, Byte.class, Short.class,
            Integer.class, Long.class, Float.class, Double.class, BigDecimal.class, BigInteger.class);
    private static final Set<Class<?>> COLLECTIONS = Set.of(List.of().getClass(), List.of(1).getClass(), Set.of().getClass(),
            Set.of(1).getClass());
    private static final Set<Class<?>> MAPS = Set.of(Map.of().getClass(), Map.of(1, 1).getClass());

    private Constancy() { }

    /** Everything that the vocabulary gives is immutable; so are Java's values, and records and unmodifiable collections of such. */
    static boolean isConstant(Object value) {
        if (value == null || CONSTANT.contains(value.getClass()) || value instanceof Enum<?> || isOurs(value.getClass())) {
            return true;
        }
        if (COLLECTIONS.contains(value.getClass())) {
            return ((Collection<?>) value).stream().allMatch(Constancy::isConstant);
        }
        if (MAPS.contains(value.getClass())) {
            return ((Map<?, ?>) value).entrySet().stream().allMatch(e -> isConstant(e.getKey()) && isConstant(e.getValue()));
        }
        return value instanceof Record record && isConstant(record);
    }

    /** A hidden class is a lambda; what it holds on to is not known. */
    private static boolean isOurs(Class<?> type) {
        return type.getName().startsWith("fieldwright.") && !type.isHidden();
    }

    private static boolean isConstant(Record record) {
        for (RecordComponent component : record.getClass().getRecordComponents()) {
            try {
                var accessor = component.getAccessor();
                accessor.setAccessible(true);
                if (!isConstant(accessor.invoke(record))) {
                    return false;
                }
            } catch (ReflectiveOperationException | RuntimeException e) {
                return false;
            }
        }
        return true;
    }
}

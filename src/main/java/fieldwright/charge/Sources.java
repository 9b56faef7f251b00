package fieldwright.charge;

import java.util.List;

import fieldwright.quantity.AuthorException;

/** Several sources together; all must stand in the same surroundings. */
public record Sources(List<Source> parts) implements Source {
    /** Errors: AuthorException when there are none, or when two stand in different surroundings. */
    public Sources {
        parts = List.copyOf(parts);
        if (parts.isEmpty()) {
            throw new AuthorException("sources(): nothing in it. Name at least one charge.");
        }
        Surroundings first = parts.get(0).around();
        for (Source part : parts) {
            Surroundings other = part.around();
            if (first != null && other != null && !first.equals(other)) {
                throw new AuthorException("sources in different surroundings, " + first.title() + " and " + other.title()
                    + ": charges that act together stand in the same surroundings. State them once on the whole: sources(a, b).inFreeSpace().");
            }
            first = first == null ? other : first;
        }
    }

    /** The surroundings of all parts; null while one part has none stated. */
    @Override
    public Surroundings around() {
        for (Source part : parts) {
            if (part.around() == null) {
                return null;
            }
        }
        return parts.get(0).around();
    }

    @Override
    public Sources with(Surroundings surroundings) {
        return new Sources(parts.stream().map(p -> p.with(surroundings)).map(p -> (Source) p).toList());
    }
}

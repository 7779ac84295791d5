package org.laddergate.limits;

import java.util.List;
import java.util.Optional;

/** Product definitions. Safe for use from many threads. */
public interface ProductStore {
    Optional<Product> find(String name);

    /** Names in alphabetical order. */
    List<String> names();

    /** Writes the definition; replaces an earlier one of the same name. Durable when it returns. */
    void save(Product product);
}

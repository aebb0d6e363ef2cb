package org.toprung.core.cache;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.concurrent.atomic.AtomicInteger;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;

class BoundedCacheTest {
  @Test
  void remembersUpToItsCapacityAndForgetsTheOldestFirst() {
    AtomicInteger calls = new AtomicInteger();
    BoundedCache<Integer, String> cache =
        new BoundedCache<>(
            2,
            key -> {
              calls.incrementAndGet();
              return "value " + key;
            });
    String one = cache.get(1);
    cache.get(2);
    assertSame(one, cache.get(1));
    assertEquals(2, calls.get());
    cache.get(3);
    assertEquals("value 1", cache.get(1));
    assertEquals(4, calls.get());
    assertEquals("value 3", cache.get(3));
    assertEquals(4, calls.get());
  }

  @Test
  void theFunctionMayAskTheCacheForOtherArguments() {
    BoundedCache<Integer, Integer>[] fibonacci = newArray();
    fibonacci[0] =
        new BoundedCache<>(100, n -> n < 2 ? n : fibonacci[0].get(n - 1) + fibonacci[0].get(n - 2));
    assertEquals(832040, fibonacci[0].get(30));
  }

  @SuppressWarnings("unchecked")
  private static BoundedCache<Integer, Integer>[] newArray() {
    return (BoundedCache<Integer, Integer>[]) new BoundedCache<?, ?>[1];
  }

  @Test
  void failuresAreNotRemembered() {
    AtomicInteger calls = new AtomicInteger();
    BoundedCache<Integer, Integer> cache =
        new BoundedCache<>(
            10,
            key -> {
              calls.incrementAndGet();
              throw new IllegalArgumentException("no " + key);
            });
    assertThrows(IllegalArgumentException.class, () -> cache.get(1));
    assertThrows(IllegalArgumentException.class, () -> cache.get(1));
    assertEquals(2, calls.get());
  }

  @Test
  void concurrentReadersSeeRightResultsWhileEntriesAreForgotten() {
    BoundedCache<Integer, Integer> cache = new BoundedCache<>(5, key -> key * key);
    boolean right =
        IntStream.range(0, 20_000)
            .parallel()
            .map(i -> i % 13)
            .allMatch(key -> cache.get(key) == key * key);
    assertEquals(true, right);
  }
}

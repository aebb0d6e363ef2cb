package org.toprung.core.cache;

import java.util.Queue;
import java.util.concurrent.ConcurrentHashMap;
import java.util.concurrent.ConcurrentLinkedQueue;
import java.util.concurrent.ConcurrentMap;
import java.util.function.Function;

/**
 * Remembers the results of a deterministic function, at most a given number of them; the oldest are
 * forgotten first. Thread-safe; readers never wait. Two threads that miss at once may both compute,
 * and get the same stored result.
 *
 * @param <K> argument of the function
 * @param <V> result of the function
 */
public final class BoundedCache<K, V> {
  private final ConcurrentMap<K, V> entries = new ConcurrentHashMap<>();
  private final Queue<K> order = new ConcurrentLinkedQueue<>();
  private final int capacity;
  private final Function<K, V> function;

  /**
   * An empty cache.
   *
   * @param capacity number of results kept, at least 1
   * @param function the function, deterministic; may use this cache itself
   */
  public BoundedCache(int capacity, Function<K, V> function) {
    this.capacity = capacity;
    this.function = function;
  }

  /**
   * The result for an argument.
   *
   * @param key the argument
   * @return the remembered or computed result
   */
  public V get(K key) {
    V known = entries.get(key);
    if (known != null) {
      return known;
    }
    // not computeIfAbsent: the function may come back here for other keys, which that forbids
    V computed = function.apply(key);
    V raced = entries.putIfAbsent(key, computed);
    if (raced != null) {
      return raced;
    }
    order.add(key);
    while (entries.size() > capacity) {
      K oldest = order.poll();
      if (oldest == null) {
        break;
      }
      entries.remove(oldest);
    }
    return computed;
  }
}

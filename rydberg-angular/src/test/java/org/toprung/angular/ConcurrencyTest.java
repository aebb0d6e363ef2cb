package org.toprung.angular;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertNotSame;

import java.lang.reflect.Method;
import java.net.URL;
import java.net.URLClassLoader;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.SplittableRandom;
import java.util.concurrent.CyclicBarrier;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import org.apache.commons.numbers.core.DD;
import org.junit.jupiter.api.Test;

class ConcurrencyTest {

  private static final int THREADS = 16;

  /**
   * The classes are loaded afresh, so that the threads race for tables that no one has built yet.
   */
  @Test
  void manyThreadsOnColdTablesGetTheBitsOfOneThread() throws Exception {
    URL[] path = {location(Wigner.class), location(DD.class)};
    try (URLClassLoader loader = new URLClassLoader(path, ClassLoader.getPlatformClassLoader())) {
      Class<?> cold = loader.loadClass(Wigner.class.getName());
      assertNotSame(Wigner.class, cold);
      Class<?>[] ints = new Class<?>[6];
      Arrays.fill(ints, int.class);
      Method threeJ = cold.getMethod("threeJDoubled", ints);
      Method sixJ = cold.getMethod("sixJDoubled", ints);
      Method exact = cold.getMethod("exactThreeJDoubled", ints);
      Method toDouble = loader.loadClass(SignedRoot.class.getName()).getMethod("doubleValue");

      ExecutorService pool = Executors.newFixedThreadPool(THREADS);
      try {
        CyclicBarrier start = new CyclicBarrier(THREADS);
        List<Future<double[]>> results = new ArrayList<>();
        for (int i = 0; i < THREADS; i++) {
          results.add(
              pool.submit(
                  () -> {
                    start.await();
                    SplittableRandom random = new SplittableRandom(77);
                    double[] values = new double[600];
                    for (int k = 0; k < values.length; k += 3) {
                      Object[] a = boxed(RandomArguments.threeJ(random, 400));
                      values[k] = (double) threeJ.invoke(null, a);
                      values[k + 1] = (double) toDouble.invoke(exact.invoke(null, a));
                      values[k + 2] =
                          (double) sixJ.invoke(null, boxed(RandomArguments.sixJ(random, 400)));
                    }
                    return values;
                  }));
        }
        SplittableRandom random = new SplittableRandom(77);
        double[] alone = new double[600];
        for (int k = 0; k < alone.length; k += 3) {
          int[] a = RandomArguments.threeJ(random, 400);
          alone[k] = Wigner.threeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]);
          alone[k + 1] =
              Wigner.exactThreeJDoubled(a[0], a[1], a[2], a[3], a[4], a[5]).doubleValue();
          int[] b = RandomArguments.sixJ(random, 400);
          alone[k + 2] = Wigner.sixJDoubled(b[0], b[1], b[2], b[3], b[4], b[5]);
        }
        for (Future<double[]> result : results) {
          assertArrayEquals(alone, result.get());
        }
      } finally {
        pool.shutdownNow();
      }
    }
  }

  private static URL location(Class<?> type) {
    return type.getProtectionDomain().getCodeSource().getLocation();
  }

  private static Object[] boxed(int[] a) {
    return Arrays.stream(a).boxed().toArray();
  }
}

/**
 * Open data of the checks, each with the figures published or recomputed for it.
 * Aircraft: times between failures of air conditioning, in hours and in order of time; F. Proschan,
 * "Theoretical explanation of observed decreasing failure rate", Technometrics 5 (1963) 375–383. Digits of the limits
 * and statistics recomputed independently.
 */
export type Plane = { plane: number; intervals: number[]; mtbf: number; low: number; high: number; laplace: number; militaryHandbook: number };

export const aircraft: Plane[] = [
  { plane: 7907, intervals: [194, 15, 41, 29, 33, 181], mtbf: 82.167, low: 42.25, high: 223.9, laplace: 0.0361, militaryHandbook: 6.9934 },
  { plane: 7908, intervals: [413, 14, 58, 37, 100, 65, 9, 169, 447, 184, 36, 201, 118, 34, 31, 18, 18, 67, 57, 62, 7, 22, 34], mtbf: 95.696, low: 66.08, high: 150.96, laplace: 2.2354, militaryHandbook: 26.4284 },
  { plane: 7909, intervals: [90, 10, 60, 186, 61, 49, 14, 24, 56, 20, 79, 84, 44, 59, 29, 118, 25, 156, 310, 76, 26, 44, 23, 62, 130, 208, 70, 101, 208], mtbf: 83.517, low: 59.85, high: 124.71, laplace: -1.4804, militaryHandbook: 64.3923 },
  { plane: 7910, intervals: [74, 57, 48, 29, 502, 12, 70, 21, 29, 386, 59, 27, 153, 26, 326], mtbf: 121.267, low: 77.44, high: 216.67, laplace: -0.7497, militaryHandbook: 32.137 },
  { plane: 7911, intervals: [55, 320, 56, 104, 220, 239, 47, 246, 176, 182, 33, 15, 104, 35], mtbf: 130.857, low: 82.41, high: 239.35, laplace: 0.9655, militaryHandbook: 21.4096 },
  { plane: 7912, intervals: [23, 261, 87, 7, 120, 14, 62, 47, 225, 71, 246, 21, 42, 20, 5, 12, 120, 11, 3, 14, 71, 11, 14, 11, 16, 90, 1, 16, 52, 95], mtbf: 59.6, low: 42.93, high: 88.34, laplace: 2.2065, militaryHandbook: 39.8429 },
  { plane: 7913, intervals: [97, 51, 11, 4, 141, 18, 142, 68, 77, 80, 1, 16, 106, 206, 82, 54, 31, 216, 46, 111, 39, 63, 18, 191, 18, 163, 24], mtbf: 76.815, low: 54.44, high: 116.56, laplace: -0.5447, militaryHandbook: 54.6695 },
  { plane: 7914, intervals: [50, 44, 102, 72, 22, 39, 3, 15, 197, 188, 79, 88, 46, 5, 5, 36, 22, 139, 210, 97, 30, 23, 13, 14], mtbf: 64.125, low: 44.59, high: 100.08, laplace: 0.2565, militaryHandbook: 44.1166 },
  { plane: 7915, intervals: [359, 9, 12, 270, 603, 3, 104, 2, 438], mtbf: 200.0, low: 114.19, high: 437.38, laplace: -0.1442, militaryHandbook: 14.1097 },
  { plane: 7916, intervals: [50, 254, 5, 283, 35, 12], mtbf: 106.5, low: 54.76, high: 290.2, laplace: 0.6897, militaryHandbook: 8.2254 },
  { plane: 7917, intervals: [130, 493], mtbf: 311.5, low: 111.82, high: 2572.16, laplace: -1.0092, militaryHandbook: 3.134 },
  { plane: 8044, intervals: [487, 18, 100, 7, 98, 5, 85, 91, 43, 230, 3, 130], mtbf: 108.083, low: 65.9, high: 209.17, laplace: 1.1729, militaryHandbook: 12.0707 },
  { plane: 8045, intervals: [102, 209, 14, 57, 54, 32, 67, 59, 134, 152, 27, 14, 230, 66, 61, 34], mtbf: 82.0, low: 53.03, high: 143.46, laplace: 0.2693, militaryHandbook: 24.7779 },
];

/** Dates of coal-mining disasters in Great Britain, 1851–1962, decimal years; R. G. Jarrett, Biometrika 66 (1979) 191–193. */
export const coal: number[] = [
  1851.203, 1851.632, 1851.969, 1851.975, 1852.314, 1852.347, 1852.358, 1852.385, 1852.977, 1853.196, 1853.229, 1853.319,
  1853.5, 1854.135, 1856.396, 1856.506, 1856.539, 1856.618, 1857.138, 1857.404, 1857.582, 1858.091, 1858.154, 1858.406,
  1858.945, 1860.125, 1860.169, 1860.591, 1860.851, 1860.919, 1860.971, 1861.185, 1861.738, 1861.836, 1862.138, 1862.893,
  1862.937, 1863.178, 1863.794, 1863.939, 1863.986, 1865.459, 1865.971, 1866.064, 1866.34, 1866.452, 1866.833, 1866.948,
  1866.951, 1867.635, 1867.854, 1867.862, 1868.749, 1868.903, 1868.988, 1869.251, 1869.442, 1869.554, 1869.809, 1869.875,
  1870.124, 1870.515, 1870.559, 1870.633, 1871.027, 1871.151, 1871.167, 1871.736, 1871.816, 1872.123, 1872.24, 1872.769,
  1873.136, 1874.285, 1874.546, 1874.888, 1874.981, 1875.329, 1875.925, 1875.931, 1875.931, 1876.966, 1877.064, 1877.105,
  1877.19, 1877.779, 1877.809, 1878.184, 1878.195, 1878.236, 1878.433, 1878.696, 1879.036, 1879.172, 1879.501, 1880.057,
  1880.539, 1880.689, 1880.944, 1881.105, 1881.968, 1882.129, 1882.296, 1882.299, 1882.335, 1882.852, 1883.797, 1883.851,
  1884.073, 1884.856, 1885.168, 1885.464, 1885.979, 1886.617, 1886.693, 1886.754, 1886.921, 1887.134, 1887.405, 1888.298,
  1889.051, 1889.198, 1889.793, 1890.102, 1890.19, 1891.252, 1891.665, 1892.654, 1893.508, 1894.477, 1895.318, 1896.07,
  1896.284, 1896.331, 1899.63, 1901.393, 1902.671, 1905.056, 1905.188, 1905.524, 1906.773, 1908.136, 1908.27, 1908.629,
  1909.127, 1909.825, 1910.357, 1910.97, 1912.52, 1913.784, 1914.409, 1916.615, 1918.031, 1922.529, 1922.677, 1923.569,
  1927.162, 1928.114, 1930.154, 1930.748, 1931.077, 1931.83, 1931.884, 1932.065, 1932.864, 1932.875, 1933.883, 1934.723,
  1935.643, 1935.695, 1936.596, 1937.5, 1938.354, 1939.821, 1940.218, 1940.424, 1941.42, 1941.522, 1941.574, 1942.001,
  1942.129, 1942.483, 1946.945, 1947.025, 1947.619, 1947.638, 1947.687, 1951.405, 1957.883, 1960.489, 1962.22,
];

/** Defects on 25 wafers in order; NIST/SEMATECH e-Handbook, section 6.3.3.1. */
export const wafers = [16, 14, 28, 16, 12, 20, 10, 12, 10, 17, 19, 17, 14, 16, 15, 13, 14, 16, 11, 20, 11, 19, 16, 31, 13];

/** Non-conformities in 26 samples of circuit boards; D. C. Montgomery, Introduction to Statistical Quality Control, 2nd ed., pp. 173–175. */
export const boards = [21, 24, 16, 12, 15, 5, 28, 20, 31, 25, 20, 24, 16, 19, 10, 17, 13, 22, 18, 39, 30, 24, 16, 19, 17, 15];

/** Dyed cloth: defects and inspection units of ten rolls; Montgomery, pp. 183–184. */
export const cloth = {
  defects: [14, 12, 20, 11, 7, 10, 21, 16, 19, 23],
  units: [10, 8, 13, 10, 9.5, 10, 12, 10.5, 12, 12.5],
};

/** System ages at ten repairs, watched until 1500 h; NIST/SEMATECH e-Handbook, case study in section 8.2.2.3. */
export const repairs = { times: [5, 40, 43, 175, 389, 712, 747, 795, 1299, 1478], end: 1500 };

/** Failure times of one system, watched until 300 h; MIL-HDBK-189 (1981), appendix C. */
export const handbook = {
  times: [2.6, 16.5, 16.5, 17.0, 21.4, 29.1, 33.3, 56.5, 63.1, 70.6, 73.0, 77.7, 93.9, 95.5, 98.1, 101.1, 132.0, 142.2, 147.7, 149.0, 167.2, 190.7, 193.0, 198.7, 251.9, 282.5, 286.1],
  end: 300,
};

/** Flow rate, ten readings; NIST/SEMATECH e-Handbook, section 6.3.2.2. */
export const flowrate = [49.6, 47.6, 49.9, 51.3, 47.8, 51.2, 52.6, 52.4, 53.6, 52.1];

/**
 * Weeks in remission under 6-mercaptopurine, 21 patients; E. J. Freireich et al., Blood 21 (1963) 699–716,
 * the worked example of many textbooks (data from memory). A minus marks a patient still in remission.
 */
export const remission = [6, 6, 6, -6, 7, -9, 10, -10, -11, 13, 16, -17, -19, -20, 22, 23, -25, -32, -32, -34, -35].map((week) => ({
  time: Math.abs(week),
  failed: week > 0,
}));

/** Intervals to the running sum, so that the first event comes after the first interval. */
export function runningSum(intervals: readonly number[]): number[] {
  let sum = 0;
  return intervals.map((interval) => (sum += interval));
}

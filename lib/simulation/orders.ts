/** A supplier's open orders, oldest first, in parallel arrays that grow. */
export type Orders = {
  planned: Int32Array;
  expected: Int32Array;
  units: Int32Array;
  count: number;
  /** Least of `planned` and of `expected`; `farDay` where nothing is open. */
  nextPlanned: number;
  nextExpected: number;
  /** Planned day of the last order placed. */
  lastPlanned: number;
};

/** Later than any day of a run. */
export const farDay = 2 ** 31 - 1;

export function createOrders(): Orders {
  const capacity = 16;
  const orders = {
    planned: new Int32Array(capacity),
    expected: new Int32Array(capacity),
    units: new Int32Array(capacity),
    count: 0,
    nextPlanned: farDay,
    nextExpected: farDay,
    lastPlanned: 0,
  };
  return orders;
}

export function clearOrders(orders: Orders): void {
  orders.count = 0;
  orders.nextPlanned = farDay;
  orders.nextExpected = farDay;
  orders.lastPlanned = 0;
}

export function addOrder(orders: Orders, planned: number, expected: number, units: number): void {
  if (orders.count === orders.units.length) {
    orders.planned = grow(orders.planned);
    orders.expected = grow(orders.expected);
    orders.units = grow(orders.units);
  }
  orders.planned[orders.count] = planned;
  orders.expected[orders.count] = expected;
  orders.units[orders.count] = units;
  orders.count++;
  orders.lastPlanned = planned;
  if (planned < orders.nextPlanned) orders.nextPlanned = planned;
  if (expected < orders.nextExpected) orders.nextExpected = expected;
}

function grow(array: Int32Array): Int32Array {
  const larger = new Int32Array(array.length * 2);
  larger.set(array);
  return larger;
}

import { spansOn, type Hours } from '#shared/time/hours';
import { addDays, type LocalDate } from '#shared/time/zone';

/** Days that are looked through for one working day; a shop without hours counts every day. */
const LOOK_BACK_DAYS = 60;

/** What lies between the day an order is ready and the day the customer has it, in working days. */
export interface Delivery {
  transitDays: number;
  packingDays: number;
}

/**
 * The day the plan aims at: due, less the transit's working days, less packing's. It is a day the shop works, as is the
 * day on which the carrier takes the boards.
 */
export function shipByOf(hours: Hours, dueDate: LocalDate, delivery: Delivery): LocalDate {
  const handedOver = workingDaysBefore(hours, dueDate, delivery.transitDays);
  return workingDaysBefore(hours, handedOver, delivery.packingDays);
}

/** The working day that lies so many working days before a date; with none, that date or the last working day before. */
function workingDaysBefore(hours: Hours, date: LocalDate, days: number): LocalDate {
  let day = days === 0 ? lastOpen(hours, date) : date;
  for (let left = days; left > 0; left--) day = lastOpen(hours, addDays(day, -1));
  return day;
}

function lastOpen(hours: Hours, date: LocalDate): LocalDate {
  for (let back = 0; back <= LOOK_BACK_DAYS; back++) {
    const day = addDays(date, -back);
    if (spansOn(hours, day).length > 0) return day;
  }
  return date;
}

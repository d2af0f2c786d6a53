//! Putting short lists in order.

use std::cmp::Ordering;

/// Puts `list` in the order of `compare`; what compares equal keeps its place.
///
/// Insertion, which takes the square of the length. The lists of a study are short, and the sort of
/// the standard library adds 3 kB to the page for each type it is used with.
pub fn put_in_order<T>(list: &mut [T], compare: impl Fn(&T, &T) -> Ordering) {
    for end in 1..list.len() {
        let mut at = end;
        while at > 0 && compare(&list[at - 1], &list[at]) == Ordering::Greater {
            list.swap(at - 1, at);
            at -= 1;
        }
    }
}

#[cfg(test)]
mod tests {
    use super::put_in_order;

    #[test]
    fn equal_ones_keep_their_place() {
        let mut list = [(2, 'a'), (1, 'b'), (2, 'c'), (1, 'd'), (0, 'e')];
        put_in_order(&mut list, |a, b| a.0.cmp(&b.0));
        assert_eq!(list, [(0, 'e'), (1, 'b'), (1, 'd'), (2, 'a'), (2, 'c')]);
        let mut none: [f64; 0] = [];
        put_in_order(&mut none, f64::total_cmp);
        let mut numbers = [3.0, f64::NAN, -1.0, 2.0];
        put_in_order(&mut numbers, f64::total_cmp);
        assert_eq!(numbers[..3], [-1.0, 2.0, 3.0]);
    }
}

//! A polygon cut into triangles, for painters that fill convex shapes only.

use super::plane::{Point, signed_area, turn};

/// Triangles of a simple polygon by cutting off ears.
///
/// An ear is a corner that turns with the polygon and holds no other corner. Where
/// rounding leaves none, the corner at hand goes, so that it always ends. Only corners that
/// turn the other way can lie in an ear, and none becomes one as ears are cut off.
///
/// Source: common practice; that every simple polygon has two ears is G. H. Meisters,
/// Amer. Math. Monthly 82 (1975) 648 [from memory].
pub(super) fn triangles(outline: &[Point]) -> Vec<[usize; 3]> {
    let left = if signed_area(outline) < 0.0 {
        -1.0
    } else {
        1.0
    };
    let mut corners: Vec<usize> = (0..outline.len()).collect();
    corners.dedup_by_key(|i| (outline[*i].x.to_bits(), outline[*i].y.to_bits()));
    let n = corners.len();
    let inward: Vec<usize> = (0..n)
        .filter(|at| {
            let [a, b, c] = [(at + n - 1) % n, *at, (at + 1) % n].map(|k| outline[corners[k]]);
            left * turn(a, b, c) < 0.0
        })
        .map(|at| corners[at])
        .collect();
    let mut triangles = Vec::with_capacity(n);
    let mut at = 0;
    let mut tried = 0;
    while corners.len() > 3 {
        let n = corners.len();
        at %= n;
        let [a, b, c] = [(at + n - 1) % n, at, (at + 1) % n].map(|k| corners[k]);
        if tried >= n || is_ear(outline, &inward, [a, b, c], left) {
            let is_flat = turn(outline[a], outline[b], outline[c]) == 0.0;
            if !is_flat {
                triangles.push([a, b, c]);
            }
            corners.remove(at);
            tried = 0;
            // The next ear is sought a step on, so that triangles do not fan out of one corner.
            at += 1;
        } else {
            tried += 1;
            at += 1;
        }
    }
    if let [a, b, c] = corners[..] {
        triangles.push([a, b, c]);
    }
    triangles
}

fn is_ear(outline: &[Point], inward: &[usize], [a, b, c]: [usize; 3], left: f64) -> bool {
    let (p, q, r) = (outline[a], outline[b], outline[c]);
    let area = left * turn(p, q, r);
    if area < 0.0 {
        return false;
    }
    if area == 0.0 {
        return true;
    }
    inward
        .iter()
        .filter(|i| ![a, b, c].contains(i))
        .map(|i| outline[*i])
        .filter(|x| *x != p && *x != q && *x != r)
        .all(|x| {
            let sides = [turn(p, q, x), turn(q, r, x), turn(r, p, x)];
            !sides.iter().all(|side| left * side >= 0.0)
        })
}

#[cfg(test)]
mod tests {
    use super::*;

    fn check(points: &[(f64, f64)]) {
        let mut outline: Vec<Point> = points.iter().map(|(x, y)| Point::new(*x, *y)).collect();
        for _ in 0..2 {
            let expected = signed_area(&outline);
            let sum: f64 = triangles(&outline)
                .iter()
                .map(|t| 0.5 * turn(outline[t[0]], outline[t[1]], outline[t[2]]))
                .sum();
            assert!((sum - expected).abs() < 1e-12, "{sum} {expected}");
            let all: f64 = triangles(&outline)
                .iter()
                .map(|t| 0.5 * turn(outline[t[0]], outline[t[1]], outline[t[2]]).abs())
                .sum();
            assert!((all - expected.abs()).abs() < 1e-12, "they overlap");
            outline.reverse();
        }
    }

    #[test]
    fn triangles_cover_the_polygon_once() {
        check(&[(0.0, 0.0), (1.0, 0.0), (1.0, 1.0), (0.0, 1.0)]);
        // A comb, a straight corner, a doubled point.
        check(&[
            (0.0, 0.0),
            (5.0, 0.0),
            (5.0, 3.0),
            (4.0, 3.0),
            (4.0, 1.0),
            (3.0, 1.0),
            (3.0, 3.0),
            (2.0, 3.0),
            (2.0, 1.0),
            (1.0, 1.0),
            (1.0, 1.0),
            (1.0, 3.0),
            (0.0, 3.0),
            (0.0, 2.0),
        ]);
        let star: Vec<(f64, f64)> = (0..40)
            .map(|i| {
                let r = if i % 2 == 0 { 1.0 } else { 0.3 };
                let (sin, cos) = f64::to_radians(9.0 * f64::from(i)).sin_cos();
                (r * cos, r * sin)
            })
            .collect();
        check(&star);
    }

    #[test]
    fn too_few_points_have_no_triangle() {
        assert!(triangles(&[]).is_empty());
        assert!(triangles(&[Point::new(0.0, 0.0), Point::new(1.0, 0.0)]).is_empty());
    }
}

//! Small dense systems, as many equations as figures are wanted.

/// Solves a symmetric positive definite system by Cholesky's method; none when it is not.
pub(super) fn solve_symmetric(mut a: Vec<Vec<f64>>, mut b: Vec<f64>) -> Option<Vec<f64>> {
    let n = b.len();
    for i in 0..n {
        for j in 0..=i {
            let known: f64 = (0..j).map(|k| a[i][k] * a[j][k]).sum();
            let rest = a[i][j] - known;
            a[i][j] = if i == j {
                if rest <= 0.0 || !rest.is_finite() {
                    return None;
                }
                rest.sqrt()
            } else {
                rest / a[j][j]
            };
        }
    }
    for i in 0..n {
        let known: f64 = (0..i).map(|k| a[i][k] * b[k]).sum();
        b[i] = (b[i] - known) / a[i][i];
    }
    for i in (0..n).rev() {
        let known: f64 = (i + 1..n).map(|k| a[k][i] * b[k]).sum();
        b[i] = (b[i] - known) / a[i][i];
    }
    Some(b)
}

/// The shortest step `d` that makes `|J d - b|^2 + damping |d|^2` least, with `low <= d <= high`.
///
/// `d = J^T (J J^T + damping)^-1 b`, over the parts that are free; a part that would leave its bounds is set to the bound and taken out, at most once each.
pub(super) fn bounded_step(
    jacobian: &[Vec<f64>],
    b: &[f64],
    damping: f64,
    low: &[f64],
    high: &[f64],
) -> Option<Vec<f64>> {
    let (m, n) = (b.len(), low.len());
    let mut fixed: Vec<Option<f64>> = vec![None; n];
    for _ in 0..=n {
        let mut rest = b.to_vec();
        for (row, rest) in jacobian.iter().zip(&mut rest) {
            *rest -= row.iter().zip(&fixed).map(|(j, d)| j * d.unwrap_or(0.0)).sum::<f64>();
        }
        let mut system = vec![vec![0.0; m]; m];
        for i in 0..m {
            for k in 0..m {
                let free = (0..n).filter(|&v| fixed[v].is_none());
                system[i][k] = free.map(|v| jacobian[i][v] * jacobian[k][v]).sum();
            }
            system[i][i] += damping;
        }
        let y = solve_symmetric(system, rest)?;
        let mut step: Vec<f64> = (0..n)
            .map(|v| fixed[v].unwrap_or_else(|| (0..m).map(|i| jacobian[i][v] * y[i]).sum()))
            .collect();
        let mut held = false;
        for v in 0..n {
            let inside = step[v].clamp(low[v], high[v]);
            if fixed[v].is_none() && inside != step[v] {
                fixed[v] = Some(inside);
                held = true;
            }
            step[v] = inside;
        }
        if !held {
            return Some(step);
        }
    }
    None
}

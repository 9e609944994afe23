#pragma once
// Square matrices of conductances whose entries lie in a narrow band around the diagonal.
//
// Off the diagonal no entry is above zero and no row's sum is below zero. Such a matrix is held by
// its row sums instead of its diagonal (Grassmann, Taksar & Heyman 1985; Alfa, Xue & Ye 2002): then
// elimination never subtracts one quantity from another of its size, and a film that is a millionth
// of the metal's conductances still has all its digits in the answer.

#include <vector>

namespace finwright::sink {

class ConductanceBand {
public:
    ConductanceBand(int rows, int half_width);

    /// Adds to what the row's own unknown is tied to zero by.
    void ground(int row, double conductance) { at(row, row) += conductance; }
    /// Adds to what the row's unknown is tied to another row's by; the other row is left as it is.
    void tie(int row, int other, double conductance) { at(row, other) -= conductance; }

    /// Solves for one right side; the matrix is used up.
    std::vector<double> solve(std::vector<double> right) &&;

private:
    /// Entry off the diagonal, row sum on it.
    double& at(int row, int column) {
        return entries_[std::size_t(row) * std::size_t(2 * half_width_ + 1) +
                        std::size_t(column - row + half_width_)];
    }
    double pivot_of(int row);
    void eliminate(int column, std::vector<double>& right);

    int rows_, half_width_;
    std::vector<double> entries_;
    std::vector<double> pivots_;
};

} // namespace finwright::sink

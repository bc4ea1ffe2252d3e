namespace Tallybound.Coding.Numerics;

/// <summary>A running sum that keeps what each addition rounds off.</summary>
/// <remarks>Error of the result: one rounding of the sum plus terms of second order, whatever the number of terms, as long as the sum is not
/// far smaller than the sum of magnitudes. A. Neumaier, Rundungsfehleranalyse einiger Verfahren zur Summation endlicher Summen, ZAMM 54 (1974), 39-51, method IV.
/// What is rounded off is found without asking which of the two is larger: D. Knuth, The Art of Computer Programming 2, section 4.2.2, theorem B.
/// The default value is an empty sum, 0.</remarks>
public struct NeumaierSum
{
    private double _sum, _roundedOff;

    /// <summary>The sum so far; 0 before the first term.</summary>
    public readonly double Value => _sum + _roundedOff;

    /// <summary>Adds one finite term.</summary>
    public void Add(double term)
    {
        double sum = _sum + term, taken = sum - _sum;
        _roundedOff += (_sum - (sum - taken)) + (term - taken);
        _sum = sum;
    }
}

using System.Globalization;
using System.Text;
using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Payloads;

/// <summary>The findings of one message: made only when something is wrong, and bounded, so that a hostile pack cannot multiply itself.</summary>
internal sealed class FindingList
{
    /// <summary>Most findings listed for one message.</summary>
    public const int Limit = 16;

    private readonly List<Finding> _findings = [];
    private int _more;

    public bool Any => _findings.Count > 0;

    public void Add(string code, string where, string message, ReadOnlySpan<byte> value, string cure)
    {
        if (_findings.Count < Limit)
        {
            ReadOnlySpan<byte> shown = value[..Math.Min(value.Length, Finding.MaximumQuotedLength + 1)];
            _findings.Add(new Finding(code, where, message, Finding.Quote(Encoding.UTF8.GetString(shown)), cure));
        }
        else
        {
            _more++;
        }
    }

    public void AddWithoutValue(string code, string where, string message, string cure)
    {
        if (_findings.Count < Limit)
        {
            _findings.Add(new Finding(code, where, message, null, cure));
        }
        else
        {
            _more++;
        }
    }

    /// <summary>The findings, with a closing line for those not listed.</summary>
    public IReadOnlyList<Finding> ToList()
    {
        if (_more > 0)
        {
            _findings.Add(new Finding(
                IntakeCode.MoreFindings,
                string.Empty,
                "More is wrong with this message than is listed.",
                _more.ToString(CultureInfo.InvariantCulture),
                "Mend what is listed and send again."));
            _more = 0;
        }

        return _findings;
    }
}

"""An issue is plain data that can be compared and left short."""

from workbench.deal.issues import Issue


def test_an_issue_may_be_no_more_than_a_place_and_a_code() -> None:
    issue = Issue("leave.hold", "missing")
    assert (issue.value, issue.low, issue.high, dict(issue.other)) == (None, None, None, {})


def test_issues_with_the_same_data_are_equal() -> None:
    assert Issue("leave.hold", "out_of_range", 50, 1, 40) == Issue(
        "leave.hold", "out_of_range", 50, 1, 40
    )
    assert Issue("leave.hold", "missing") != Issue("leave.hold", "missing", other={"a": 1})

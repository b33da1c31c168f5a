"""Currencies of ISO 4217: their codes, the digits of their minor unit and, for some, a sign."""

from dataclasses import dataclass

_TWO_DIGITS = """
AED AFN ALL AMD AOA ARS AUD AWG AZN BAM BBD BDT BGN BMD BND BOB BOV BRL BSD BTN BWP BYN BZD CAD
CDF CHE CHF CHW CNY COP COU CRC CUP CVE CZK DKK DOP DZD EGP ERN ETB EUR FJD FKP GBP GEL GHS GIP
GMD GTQ GYD HKD HNL HTG HUF IDR ILS INR IRR JMD KES KGS KHR KPW KYD KZT LAK LBP LKR LRD LSL MAD
MDL MGA MKD MMK MNT MOP MRU MUR MVR MWK MXN MXV MYR MZN NAD NGN NIO NOK NPR NZD PAB PEN PGK PHP
PKR PLN QAR RON RSD RUB SAR SBD SCR SDG SEK SGD SHP SLE SOS SRD SSP STN SVC SYP SZL THB TJS TMT
TOP TRY TTD TWD TZS UAH USD USN UYU UZS VED VES WST XCD XCG YER ZAR ZMW ZWG
"""
_NO_DIGITS = "BIF CLP DJF GNF ISK JPY KMF KRW PYG RWF UGX UYI VND VUV XAF XOF XPF"
_THREE_DIGITS = "BHD IQD JOD KWD LYD OMR TND"
_FOUR_DIGITS = "CLF UYW"

_SIGNS = {
    "USD": "$", "EUR": "€", "GBP": "£", "JPY": "¥", "INR": "₹", "BRL": "R$", "PLN": "zł",
    "SEK": "kr", "NOK": "kr", "DKK": "kr", "CHF": "CHF", "CZK": "Kč", "HUF": "Ft", "ILS": "₪",
    "KRW": "₩", "TRY": "₺", "UAH": "₴", "VND": "₫", "NGN": "₦", "AUD": "A$", "CAD": "C$",
    "NZD": "NZ$", "HKD": "HK$", "SGD": "S$", "MXN": "MX$", "ZAR": "R",
}  # fmt: skip


@dataclass(frozen=True)
class Currency:
    """One currency; `sign` is its code where it has no sign of its own here."""

    code: str
    digits: int
    sign: str


def _table() -> dict[str, Currency]:
    listed = ((_NO_DIGITS, 0), (_TWO_DIGITS, 2), (_THREE_DIGITS, 3), (_FOUR_DIGITS, 4))
    return {
        code: Currency(code, digits, _SIGNS.get(code, code))
        for codes, digits in listed
        for code in codes.split()
    }


CURRENCIES = _table()


def find_currency(code: str) -> Currency | None:
    """The currency of that ISO 4217 code in capitals, None if the list has no such code."""
    return CURRENCIES.get(code)

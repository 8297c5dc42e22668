#include "loqsmith/base/xml_scan.hpp"

#include <gtest/gtest.h>

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/base/input_error.hpp"

namespace loqsmith {
namespace {

using namespace std::string_literals;

struct Refusal {
  std::string name;
  std::string document;
  std::size_t line;
  std::size_t column;
  std::string says;  ///< a part of the message
};

std::vector<Refusal> structure_refusals() {
  return {
      {"NoBytes", "", 1, 1, "incomplete"},
      {"OnlyBlanks", " \n ", 2, 2, "a root element"},
      {"OnlyText", "hello", 1, 1, "hello"},
      {"TwoRoots", "<a/>\n<b/>", 2, 1, "behind the root"},
      {"TextBehindRoot", "<a/>\n x", 2, 2, "behind the root"},
      {"EndWithoutStart", "<a/></a>", 1, 5, "a start tag"},
      {"TagsCross", "<a><b>\n</a></b>", 2, 1, "</b>"},
      {"RootOpen", "<a><b/>\n", 2, 1, "incomplete"},
      {"CutInTag", "<a b", 1, 5, "incomplete"},
      {"CutInValue", "<a b='1", 1, 8, "incomplete"},
      {"CutInEndTag", "<a></a", 1, 7, "incomplete"},
      {"CutInComment", "<a><!-- x -", 1, 12, "incomplete"},
      {"CutInCdata", "<a><![CDATA[x]]", 1, 16, "incomplete"},
      {"CutInReference", "<a>&am", 1, 7, "incomplete"},
      {"DuplicateAttribute", "<a b='1'\n b='2'/>", 2, 2, "again"},
      {"TwinsByNamespace", "<a xmlns:p='u' xmlns:q='u' p:b='1' q:b='2'/>", 1,
       36, "again"},
      {"DuplicateDeclaration", "<a xmlns:p='u' xmlns:p='v'/>", 1, 16, "again"},
      {"ValueWithoutQuotes", "<a b=1/>", 1, 6, "quotes"},
      {"AttributeWithoutValue", "<a b/>", 1, 5, "\"=\""},
      {"NoBlankBetween", "<a b='1'c='2'/>", 1, 9, "a blank"},
      {"LessThanInValue", "<a b='x<y'/>", 1, 8, "&lt;"},
      {"BareAmpersand", "<a>x & y</a>", 1, 6, "&amp;"},
      {"AmpersandBeforeSemicolon", "<a>x & y;</a>", 1, 6, "&amp;"},
      {"ReferenceOpen", "<a>&amp</a>", 1, 4, "&amp<"},
      {"ReferenceBySignedNumber", "<a>&#-5;</a>", 1, 4, "&#-"},
      {"UnknownEntity", "<a>&nbsp;</a>", 1, 4, "&nbsp;"},
      {"UnknownEntityInValue", "<a b='&x;'/>", 1, 7, "&x;"},
      {"ReferenceToNul", "<a>&#0;</a>", 1, 4, "&#0;"},
      {"ReferenceToSurrogate", "<a>&#xD800;</a>", 1, 4, "legal character"},
      {"ReferenceTooLarge", "<a>&#x110000;</a>", 1, 4, "&"},
      {"ReferenceNoNumber", "<a>&#x;</a>", 1, 4, "&#x;"},
      {"CdataEndInText", "<a>]]></a>", 1, 4, "]]&gt;"},
      {"CdataOutside", "<![CDATA[x]]><a/>", 1, 1, "a comment"},
      {"DashesInComment", "<a><!-- x -- y --></a>", 1, 11, "--"},
  };
}

std::vector<Refusal> declaration_refusals() {
  return {
      {"LateDeclaration", "\n<?xml version='1.0'?><a/>", 2, 1, "beginning"},
      {"InstructionNamedXml", "<a><?XML x?></a>", 1, 4, "beginning"},
      {"InstructionWithColon", "<a><?b:c x?></a>", 1, 4, "colon"},
      {"Doctype", "<!DOCTYPE a><a/>", 1, 1, "DOCTYPE"},
      {"DoctypeInside", "<a><!DOCTYPE a></a>", 1, 4, "DOCTYPE"},
      {"EntityDeclared", "<a><!ENTITY b 'c'></a>", 1, 4, "comment"},
      {"Version11", "<?xml version='1.1'?><a/>", 1, 7, "1.0"},
      {"DeclarationWithoutVersion", "<?xml encoding='UTF-8'?><a/>", 1, 7,
       "version"},
      {"DeclarationOpen", "<?xml version='1.0'><a/>", 1, 20, "?>"},
      {"Standalone", "<?xml version='1.0' standalone='no!'?><a/>", 1, 21,
       "standalone"},
      {"Windows1252", "<?xml version='1.0' encoding='windows-1252'?><a/>", 1,
       21, "windows-1252"},
      {"DeclaredUtf16", "<?xml version='1.0' encoding='UTF-16'?><a/>", 1, 21,
       "UTF-16"},
      {"MarkAndLatin1",
       "\xEF\xBB\xBF<?xml version='1.0' encoding='ISO-8859-1'?><a/>", 1, 21,
       "byte order mark"},
      {"Utf16LittleEndian", "\xFF\xFE<\0a\0/\0>\0"s, 1, 1, "UTF-16"},
      {"Utf16BigEndian", "\0<\0a\0/\0>"s, 1, 1, "UTF-16"},
      {"Utf32", "\0\0\0<"s, 1, 1, "UTF-32"},
  };
}

std::vector<Refusal> character_refusals() {
  return {
      {"NulInText", "<a>\0</a>"s, 1, 4, "0x00"},
      {"ControlInText", "<a>x\x01</a>", 1, 5, "0x01"},
      {"ControlInLongText", "<a>12345678901234567890\x0B</a>", 1, 24, "0x0B"},
      {"ControlInValue", "<a b='\x02'/>", 1, 7, "0x02"},
      {"ControlInComment", "<a><!-- \x03 --></a>", 1, 9, "0x03"},
      {"ControlInCdata", "<a><![CDATA[\x04]]></a>", 1, 13, "0x04"},
      {"ControlInInstruction", "<a><?b \x05?></a>", 1, 8, "0x05"},
      {"OverlongUtf8", "<a>\xC0\xAF</a>", 1, 4, "0xC0"},
      {"SurrogateUtf8", "<a>\xED\xA0\x80</a>", 1, 4, "0xED"},
      {"TruncatedUtf8", "<a>\xE2\x82</a>", 1, 4, "0xE2"},
      {"BeyondUnicode", "<a>\xF4\x90\x80\x80</a>", 1, 4, "0xF4"},
      {"NonCharacter", "<a>\xEF\xBF\xBE</a>", 1, 4, "0xEF"},
      {"Latin1InUtf8", "<a b='\xE9'/>", 1, 7, "0xE9"},
      {"Latin1InName", "<\xE9/>", 1, 2, "0xE9"},
      {"NotAscii", "<?xml version='1.0' encoding='us-ascii'?><a>\xC3\xA9</a>",
       1, 45, "US-ASCII"},
      {"NotAsciiInName", "<?xml version='1.0' encoding='us-ascii'?><\xC3\xA9/>",
       1, 43, "US-ASCII"},
  };
}

std::vector<Refusal> name_refusals() {
  return {
      {"UndeclaredPrefix", "<p:a/>", 1, 2, "xmlns:p"},
      {"UndeclaredAttributePrefix", "<a p:b='1'/>", 1, 4, "xmlns:p"},
      {"PrefixOutOfScope", "<a><b xmlns:p='u'/><p:c/></a>", 1, 21, "xmlns:p"},
      {"PrefixTakenBack", "<a xmlns:p=''/>", 1, 4, "without a namespace"},
      {"TwoColons", "<a:b:c/>", 1, 2, "one prefix"},
      {"ColonFirst", "<:a/>", 1, 2, "one prefix"},
      {"LocalNameNoName", "<a xmlns:p='u'><p:1/></a>", 1, 17, "one prefix"},
      {"ReservedPrefix", "<a xmlns:xml='u'/>", 1, 4, "reserved"},
      {"ReservedXmlns", "<a xmlns:p='http://www.w3.org/2000/xmlns/'/>", 1, 4,
       "reserved"},
      {"NameBeginsWithDigit", "<1a/>", 1, 2, "name"},
      {"BlankBeforeName", "< a/>", 1, 2, "name"},
      {"SlashAlone", "<a / >", 1, 5, "\">\""},
      {"AttributeInEndTag", "<a></a b='1'>", 1, 8, "end tag"},
  };
}

class Refused : public testing::TestWithParam<Refusal> {};

TEST_P(Refused, NamesPlaceAndFault) {
  const Refusal& wanted = GetParam();
  try {
    check_xml(wanted.document, "x.xml");
    FAIL() << "accepted: " << wanted.document;
  } catch (const InputError& error) {
    ASSERT_EQ(error.problems().size(), 1U);
    const InputProblem& problem = error.problems().front();
    EXPECT_EQ(problem.file, "x.xml");
    EXPECT_EQ(problem.line, wanted.line) << error.what();
    EXPECT_EQ(problem.column, wanted.column) << error.what();
    EXPECT_NE(std::string(error.what()).find(wanted.says), std::string::npos)
        << error.what();
  }
}

std::string name_of(const testing::TestParamInfo<Refusal>& info) {
  return info.param.name;
}

INSTANTIATE_TEST_SUITE_P(Structure, Refused,
                         testing::ValuesIn(structure_refusals()), name_of);
INSTANTIATE_TEST_SUITE_P(Declaration, Refused,
                         testing::ValuesIn(declaration_refusals()), name_of);
INSTANTIATE_TEST_SUITE_P(Characters, Refused,
                         testing::ValuesIn(character_refusals()), name_of);
INSTANTIATE_TEST_SUITE_P(Names, Refused, testing::ValuesIn(name_refusals()),
                         name_of);

TEST(XmlScan, AcceptsWhatTheStandardsAllow) {
  const std::vector<std::string> documents{
      "<a/>",
      "<a></a>",
      "<a ></a >\n<!-- end --><?done?> \r\n",
      "\xEF\xBB\xBF<a/>",
      "<?xml version=\"1.0\"?><a/>",
      "<?xml version = '1.0' encoding = \"utf-8\" standalone='yes' ?><a/>",
      "\xEF\xBB\xBF<?xml version='1.0' encoding='UTF-8'?>\n<a/>",
      "<?xml version='1.0' encoding='Us-Ascii'?><a b='1'>x</a>",
      "<?xml version='1.0' encoding='iso-8859-1'?><a b='\xB5'>\xE9</a>",
      "<!-- before --><a b='1' c=\"it's\" d='say \"so\"' e = 'x'/>",
      "<a "
      "b='&#x0000000000000000000000041;&lt;&#65;&#x1F600;&quot;'>&gt;&amp;&"
      "apos;]] ></a>",
      "<a><![CDATA[<b>&nothing;]]]]></a>",
      "<a><?b?><?c d?><!----><!-- - --></a>",
      "<\xC3\xA9t\xC3\xA9 \xCE\xBC='\xE2\x82\xAC'>\xF0\x9F\x98\x80</"
      "\xC3\xA9t\xC3\xA9>",
      "<p:a xmlns:p='u' p:b='1' b='2' xml:lang='en'><p:c/></p:a>",
      "<a xmlns='u'><b xmlns=''/><c xmlns:xml="
      "'http://www.w3.org/XML/1998/namespace'/></a>",
      "<_a-b.c1>\t\x7F</_a-b.c1>",
  };
  for (const std::string& document : documents) {
    EXPECT_NO_THROW(check_xml(document, "x.xml")) << document;
  }
}

TEST(XmlScan, RefusesADocumentCutAtAnyByte) {
  const std::string document =
      "<?xml version='1.0' encoding='UTF-8'?>\n<a xmlns:p='u'>\n<!-- c -->"
      "<p:b p:c='&lt;\xC2\xB5'>text &#65; \xE2\x82\xAC<![CDATA[x]]></p:b>"
      "<?t v?><d/></a>";
  EXPECT_NO_THROW(check_xml(document, "x.xml"));
  for (std::size_t size = 0; size < document.size(); ++size) {
    EXPECT_THROW(check_xml(document.substr(0, size), "x.xml"), InputError)
        << size;
  }
}

TEST(XmlScan, HoldsItsLimits) {
  XmlLimits limits;
  limits.depth = 3;
  limits.attributes = 2;
  limits.namespaces = 2;
  limits.name_bytes = 7;
  limits.attribute_bytes = 5;
  limits.text_bytes = 6;
  for (const std::string document :
       {"<a><b><c/></b></a>", "<a b='1' c='2'/>", "<abcdefg/>",
        "<a b='12345'/>", "<a>123456</a>", "<a><![CDATA[123456]]></a>",
        "<a xmlns:p='1'><b xmlns:q='2'/><b xmlns:r='3'/></a>"}) {
    EXPECT_NO_THROW(check_xml(document, "x.xml", limits)) << document;
  }
  for (const std::string document :
       {"<a><b><c><d/></c></b></a>", "<a b='1' c='2' d='3'/>", "<abcdefgh/>",
        "<a b='123456'/>", "<a>1234567</a>", "<a><![CDATA[1234567]]></a>",
        "<a xmlns:p='1'><b xmlns:q='2'><c xmlns:r='3'/></b></a>"}) {
    EXPECT_THROW(check_xml(document, "x.xml", limits), InputError) << document;
  }
}

// Writes down what it hears.
class Diary : public XmlHandler {
 public:
  explicit Diary(std::string_view bytes) : bytes_(bytes) {}

  void start_element(const XmlStart& start) override {
    text_ += "(" + std::string(start.namespace_uri) + "|" +
             std::string(start.local_name);
    for (const XmlAttribute& attribute : start.attributes) {
      text_ += " " + std::string(attribute.namespace_uri) + "|" +
               std::string(attribute.local_name) + "=" +
               std::string(attribute.raw_value);
    }
    EXPECT_EQ(bytes_[start.offset], '<');
    EXPECT_EQ(bytes_[start.end - 1], '>');
  }
  void end_element(const XmlEnd& end) override {
    text_ += ")" + std::to_string(end.depth);
  }
  void text(std::size_t begin, std::size_t end, bool verbatim) override {
    text_ +=
        (verbatim ? "!" : "'") + std::string(bytes_.substr(begin, end - begin));
  }
  const std::string& read() const { return text_; }

 private:
  std::string_view bytes_;
  std::string text_;
};

TEST(XmlScan, TellsElementsNamespacesAndText) {
  const std::string document =
      "<a xmlns='u' b='&lt;'>x&amp;<!-- c -->y<p:c xmlns:p='v' p:d='1'/>"
      "<![CDATA[<z>]]><e xmlns=''/></a>";
  Diary diary(document);
  scan_xml(document, "x.xml", {}, diary);
  EXPECT_EQ(diary.read(), "(u|a |b=&lt;'x&amp;'y(v|c v|d=1)2!<z>(|e)2)1");
}

TEST(XmlScan, ConvertsLatin1) {
  const std::string document =
      "<?xml version='1.0' encoding='ISO-8859-1'?><a>\xB5g</a>";
  std::string storage;
  EXPECT_EQ(xml_as_utf8(document, "x.xml", storage),
            "<?xml version='1.0'                      ?><a>\xC2\xB5g</a>");
  const std::string plain = "<a>\xC2\xB5g</a>";
  EXPECT_EQ(xml_as_utf8(plain, "x.xml", storage).data(), plain.data());
}

TEST(XmlScan, ExpandsValuesAndText) {
  EXPECT_EQ(xml_value("&lt;&#65;&#x20AC;\t\r\n&quot;&#10;"),
            "<A\xE2\x82\xAC  \"\n");
  EXPECT_EQ(xml_text("a\r\nb\rc\t&amp;&gt;&apos;&#x1F600;&#xB5;"),
            "a\nb\nc\t&>'\xF0\x9F\x98\x80\xC2\xB5");
}

TEST(XmlScan, CountsLinesAndColumns) {
  const std::string text =
      "\xEF\xBB\xBF"
      "ab\nc\r\n\nd";
  EXPECT_EQ(line_column(text, 3).column, 1U);
  EXPECT_EQ(line_column(text, 4).column, 2U);
  EXPECT_EQ(line_column(text, 6).line, 2U);
  EXPECT_EQ(line_column(text, 6).column, 1U);
  EXPECT_EQ(line_column(text, 10).line, 4U);
  EXPECT_EQ(line_column(text, 99).column, 2U);
}

}  // namespace
}  // namespace loqsmith

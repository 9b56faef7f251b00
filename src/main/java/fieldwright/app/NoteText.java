package fieldwright.app;

import java.util.ArrayList;
import java.util.List;
import java.util.function.UnaryOperator;
import javafx.scene.Node;
import javafx.scene.control.Label;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import javafx.scene.text.Text;
import javafx.scene.text.TextFlow;
import org.commonmark.node.AbstractVisitor;
import org.commonmark.node.BlockQuote;
import org.commonmark.node.BulletList;
import org.commonmark.node.Code;
import org.commonmark.node.Emphasis;
import org.commonmark.node.FencedCodeBlock;
import org.commonmark.node.HardLineBreak;
import org.commonmark.node.Heading;
import org.commonmark.node.HtmlBlock;
import org.commonmark.node.HtmlInline;
import org.commonmark.node.Image;
import org.commonmark.node.IndentedCodeBlock;
import org.commonmark.node.Link;
import org.commonmark.node.ListItem;
import org.commonmark.node.OrderedList;
import org.commonmark.node.Paragraph;
import org.commonmark.node.SoftLineBreak;
import org.commonmark.node.StrongEmphasis;
import org.commonmark.node.ThematicBreak;
import org.commonmark.parser.Parser;

/**
 * CommonMark as text on the page. A note is read, never run: HTML stands as it is written, images as their description,
 * links with their address; nothing is loaded.
 */
final class NoteText {
    private static final Parser PARSER = Parser.builder().build();

    private NoteText() { }

    /** The blocks of a note, one below the other. */
    static VBox of(String commonmark) {
        VBox page = new VBox();
        page.getStyleClass().add("note");
        PARSER.parse(commonmark).accept(new Blocks(page));
        return page;
    }

    private static final class Blocks extends AbstractVisitor {
        private final VBox into;

        Blocks(VBox into) {
            this.into = into;
        }

        @Override
        public void visit(Paragraph paragraph) {
            into.getChildren().add(flow(paragraph, "paragraph"));
        }

        @Override
        public void visit(Heading heading) {
            into.getChildren().add(flow(heading, "heading" + Math.min(3, heading.getLevel())));
        }

        @Override
        public void visit(BulletList list) {
            items(list, i -> "•", 1);
        }

        @Override
        public void visit(OrderedList list) {
            Integer start = list.getMarkerStartNumber();
            items(list, i -> i + ".", start == null ? 1 : start);
        }

        private void items(org.commonmark.node.Node list, UnaryOperator<String> mark, int start) {
            int number = start;
            for (var item = list.getFirstChild(); item != null; item = item.getNext()) {
                VBox body = new VBox();
                body.getStyleClass().add("list-body");
                item.accept(new Blocks(body));
                Label bullet = new Label(mark.apply(Integer.toString(number++)));
                bullet.getStyleClass().add("list-mark");
                bullet.setMinWidth(Region.USE_PREF_SIZE);
                HBox row = new HBox(bullet, body);
                HBox.setHgrow(body, Priority.ALWAYS);
                row.getStyleClass().add("list-item");
                into.getChildren().add(row);
            }
        }

        @Override
        public void visit(ListItem item) {
            visitChildren(item);
        }

        @Override
        public void visit(BlockQuote quote) {
            VBox body = new VBox();
            body.getStyleClass().add("quote");
            visitInto(quote, body);
            into.getChildren().add(body);
        }

        private void visitInto(org.commonmark.node.Node parent, VBox body) {
            Blocks inner = new Blocks(body);
            for (var child = parent.getFirstChild(); child != null; child = child.getNext()) {
                child.accept(inner);
            }
        }

        @Override
        public void visit(FencedCodeBlock code) {
            verbatim(code.getLiteral());
        }

        @Override
        public void visit(IndentedCodeBlock code) {
            verbatim(code.getLiteral());
        }

        @Override
        public void visit(HtmlBlock html) {
            verbatim(html.getLiteral());
        }

        private void verbatim(String text) {
            Text t = new Text(text.stripTrailing());
            t.getStyleClass().add("code-letters");
            TextFlow flow = new TextFlow(t);
            flow.getStyleClass().add("verbatim");
            into.getChildren().add(flow);
        }

        @Override
        public void visit(ThematicBreak line) {
            Region rule = new Region();
            rule.getStyleClass().add("rule");
            into.getChildren().add(rule);
        }
    }

    private static TextFlow flow(org.commonmark.node.Node block, String style) {
        Letters letters = new Letters();
        block.accept(letters);
        TextFlow flow = new TextFlow(letters.texts.toArray(Node[]::new));
        flow.getStyleClass().addAll("letters", style);
        return flow;
    }

    /** The letters of one block, with the styles they stand under. */
    private static final class Letters extends AbstractVisitor {
        private final List<Text> texts = new ArrayList<>();
        private final List<String> styles = new ArrayList<>(List.of("prose"));

        private void add(String text, String... more) {
            Text t = new Text(text);
            t.getStyleClass().addAll(styles);
            t.getStyleClass().addAll(more);
            texts.add(t);
        }

        private void within(org.commonmark.node.Node node, String style) {
            styles.add(style);
            visitChildren(node);
            styles.remove(styles.size() - 1);
        }

        @Override
        public void visit(org.commonmark.node.Text text) {
            add(text.getLiteral());
        }

        @Override
        public void visit(Emphasis emphasis) {
            within(emphasis, "emphasis");
        }

        @Override
        public void visit(StrongEmphasis emphasis) {
            within(emphasis, "strong");
        }

        @Override
        public void visit(Code code) {
            add(code.getLiteral(), "code-letters");
        }

        @Override
        public void visit(SoftLineBreak line) {
            add(" ");
        }

        @Override
        public void visit(HardLineBreak line) {
            add("\n");
        }

        @Override
        public void visit(Link link) {
            within(link, "link");
            boolean said = link.getFirstChild() instanceof org.commonmark.node.Text t && t.getLiteral().equals(link.getDestination());
            if (!said) {
                add(" (" + link.getDestination() + ")", "soft");
            }
        }

        @Override
        public void visit(Image image) {
            add("[", "soft");
            within(image, "soft");
            add("]", "soft");
        }

        @Override
        public void visit(HtmlInline html) {
            add(html.getLiteral(), "code-letters");
        }
    }
}

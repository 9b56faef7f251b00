package fieldwright.app;

import java.util.function.IntConsumer;
import javafx.geometry.Point2D;
import javafx.scene.layout.StackPane;
import javafx.scene.text.Text;
import javafx.scene.text.TextFlow;

/** Java text to be read; a click says at which letter. The editor that takes its place looks the same. */
final class CodeText extends StackPane {
    private final TextFlow flow = new TextFlow();

    CodeText(String java, IntConsumer clickedAt) {
        getStyleClass().add("code");
        flow.getStyleClass().add("letters");
        for (JavaColours.Run run : JavaColours.of(java)) {
            Text text = new Text(run.text());
            text.getStyleClass().addAll("code-letters", run.style());
            flow.getChildren().add(text);
        }
        getChildren().add(flow);
        setOnMouseClicked(e -> {
            Point2D at = flow.sceneToLocal(e.getSceneX(), e.getSceneY());
            clickedAt.accept(Math.min(java.length(), Math.max(0, flow.hitTest(at).getInsertionIndex())));
            e.consume();
        });
    }
}
